import { describe, expect, it } from 'vitest';
import { upperBoundOn } from '../../../../src/core/codes/constant-weight/optical-bound.ts';
import {
  opticalOrthogonalCode,
  opticalOrthogonalFromDesign,
} from '../../../../src/core/codes/constant-weight/optical-orthogonal.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { plainCorrelation } from '../../../models/constant-weight.ts';
import reference from '../../../reference/constant-weight-sizes.json' with { type: 'json' };

type Entry = {
  parameters: { n: number; w: number };
  value: { bound: number; max: number; example: number[][] };
};
const published = Object.entries(reference as unknown as Record<string, Entry>).filter(([id]) =>
  id.startsWith('D-ooc-'),
);

describe('optical orthogonal codes', () => {
  it('of the reference have correlations of 1, and sizes within the bound', () => {
    expect(published.length).toBeGreaterThan(20);
    for (const [id, { parameters, value }] of published) {
      const { n, w } = parameters;
      const code = opticalOrthogonalCode(n, value.example);
      expect([code.w, code.lambda, code.autoCorrelation.value], id).toEqual([w, 1, 1]);
      expect(code.crossCorrelation.value, id).toBe(value.example.length > 1 ? 1 : 0);
      expect(Math.floor((n - 1) / (w * (w - 1))), id).toBe(value.bound);
      expect(value.max, id).toBeLessThanOrEqual(code.bound.value);
      // For triples the bound is exact by Brickell and Wei.
      if (w === 3) expect(code.bound.value, id).toBe(value.max);
    }
  });

  it('have the correlations that every shift compared gives', () => {
    const n = 31;
    const words = [
      [0, 1, 5, 11],
      [0, 2, 3, 17],
      [4, 9, 10, 30],
    ];
    const code = opticalOrthogonalCode(n, words);
    const all = Array.from({ length: n }, (_, s) => s);
    const auto = Math.max(...words.map((word) => plainCorrelation(n, word, word, all.slice(1))));
    const cross = Math.max(...words.flatMap((a, i) => words.slice(i + 1).map((b) => plainCorrelation(n, a, b, all))));
    expect([code.autoCorrelation.value, code.crossCorrelation.value]).toEqual([auto, cross]);
    expect(code.lambda).toBe(Math.max(auto, cross));
  });

  it.each([
    ['cyclic-difference-family', { v: 37, k: 4, lambda: 1 }, 3, 0],
    ['cyclic-difference-family', { v: 41, k: 5, lambda: 1 }, 2, 0],
    ['cyclic-difference-family', { v: 40, k: 4, lambda: 1 }, 3, 1],
    ['steiner-triple', { v: 15, method: 'cyclic' }, 2, 1],
    ['projective-plane', { q: 8 }, 1, 0],
  ] as const)('from %s %j meet the bound with %i words, %i short orbit left out', (family, params, count, short) => {
    const code = opticalOrthogonalFromDesign(buildDesign({ family, params }));
    expect([code.words.length, code.shortOrbits, code.bound.value]).toEqual([count, short, count]);
    expect(code.lambda).toBe(1);
  });

  it('of a cyclic design with λ = 4 share up to 4 ones and are measured against that bound', () => {
    const code = opticalOrthogonalFromDesign(buildDesign({ family: 'quadratic-residue', params: { q: 19 } }));
    expect([code.words.length, code.lambda, code.bound.value]).toEqual([1, 4, upperBoundOn(19, 9, 4).value]);
  });

  it('are not made from a design that the shift does not keep', () => {
    const design = buildDesign({ family: 'witt', params: { v: 12 } });
    expect(() => opticalOrthogonalFromDesign(design)).toThrow(/p → p \+ 1/);
    expect(() => opticalOrthogonalCode(7, [[0, 1, 1]])).toThrow(/words\[0\]/);
    expect(() => opticalOrthogonalCode(7, [[0, 1, 7]])).toThrow(/from 0 to 6/);
    expect(() => opticalOrthogonalCode(1, [])).toThrow(/n: got 1/);
  });
});
