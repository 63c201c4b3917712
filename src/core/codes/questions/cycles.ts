import { countCycles } from '../analysis/cycles.ts';
import { girth as girthOf } from '../analysis/girth.ts';
import { orbitsText, tannerOrbits } from '../analysis/tanner-orbits.ts';
import { knownSymmetry } from '../known-symmetry.ts';
import { spaced } from '../properties.ts';
import type { CodeQuestion } from './question.ts';

/** Cycles of the Tanner graph of every length that can be counted exactly, below twice the girth, and the shortest ones
 *  through each bit. */
export const cycles: CodeQuestion = {
  answer(code) {
    const { H } = code;
    const orbits = tannerOrbits(H, knownSymmetry(code));
    const girth = girthOf(H, orbits);
    const method = `closed walks that never turn back, from ${orbitsText(orbits)}`;
    if (!Number.isFinite(girth))
      return {
        lines: [{ key: 'girth', label: 'Girth', text: 'no cycles', grade: 'computed', method: 'breadth-first search' }],
      };
    const { total, perColumn, stoppedBy } = countCycles(H, girth, 2 * girth - 2, orbits);
    const lines = [...total].map(([length, count]) => ({
      key: `cycles-${length}`,
      label: `Cycles of length ${length}`,
      text: spaced(count),
      number: Number(count),
      grade: 'computed' as const,
      method: stoppedBy ? `${method}; longer ones not counted: ${stoppedBy}` : method,
    }));
    const through = perColumn.get(girth);
    return {
      lines,
      ...(through && { histogram: { of: `cycles of length ${girth} through a bit`, bars: barsOf(through) } }),
    };
  },
};

function barsOf(values: Float64Array): [number, number][] {
  const bars = new Map<number, number>();
  for (const value of values) bars.set(value, (bars.get(value) ?? 0) + 1);
  return [...bars].sort(([a], [b]) => a - b);
}
