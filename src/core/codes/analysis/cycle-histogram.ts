import type { CycleCounts } from './cycles.ts';

/** How many bits lie on each number of cycles of one length: pairs of cycles and bits, ascending. Null when cycles of that
 *  length were not counted. */
export function cycleHistogram(
  perColumn: CycleCounts['perColumn'] | undefined,
  length: number,
): [cycles: number, bits: number][] | null {
  const each = perColumn?.get(length);
  if (!each) return null;
  const bits = new Map<number, number>();
  for (const cycles of each) bits.set(cycles, (bits.get(cycles) ?? 0) + 1);
  return [...bits].sort(([a], [b]) => a - b);
}
