import { expect, test } from 'vitest';
import { families } from '../../src/core/designs/families/index.ts';
import type { CodePrediction } from '../../src/core/designs/family.ts';

test.each(families.map((f) => [f.id, f] as const))(
  'no prediction of %s up to 70,000 points contradicts itself',
  (_, family) => {
    const contradictions: string[] = [];
    for (const params of family.enumerate({ maxPoints: 70_000, maxBlocks: 1_000_000 })) {
      const { v, b, k, r, codes } = family.predict(params);
      if (b * k !== v * r) contradictions.push(`${JSON.stringify(params)}: b·k is not v·r`);
      for (const code of codes) {
        const contradiction = contradictionIn(code, v, b);
        if (contradiction) contradictions.push(`${JSON.stringify(params)} checks ${code.checks}: ${contradiction}`);
      }
    }
    expect(contradictions).toEqual([]);
  },
);

function contradictionIn(
  { checks, n, rank, k, distance, oneStepRadius }: CodePrediction,
  v: number,
  b: number,
): string {
  if (n !== (checks === 'blocks' ? v : b)) return 'the length is not that of the orientation';
  if (k.value.lower < 0 || k.value.upper > n || k.value.lower > k.value.upper) return 'the dimension is out of range';
  if (k.value.lower !== n - rank.value.upper || k.value.upper !== n - rank.value.lower)
    return 'rank and dimension differ from n';
  if (distance.value.lower > distance.value.upper || distance.value.upper > n) return 'the distance is out of range';
  const corrected = 2 * oneStepRadius.value + 1;
  return k.value.upper > 0 && corrected > distance.value.upper ? 'the radius passes half the distance' : '';
}
