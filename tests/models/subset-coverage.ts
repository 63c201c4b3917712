import type { BlockDesign } from '../../src/core/designs/block-design.ts';

/** The plain way: every t-subset written out as a string, counted over the blocks. */
export function plainCoverage(design: BlockDesign, t: number): Map<string, number> {
  const counts = new Map<string, number>();
  const all = Array.from({ length: design.v }, (_, p) => p);
  for (const subset of subsets(all, t)) counts.set(subset.join(), 0);
  for (let i = 0; i < design.b; i++) {
    const block = [...design.blockPoints.slice(design.blockStart[i], design.blockStart[i + 1])];
    for (const subset of subsets(block, t)) counts.set(subset.join(), counts.get(subset.join())! + 1);
  }
  return counts;
}

export function subsets<T>(from: readonly T[], size: number): T[][] {
  if (size === 0) return [[]];
  return from.flatMap((first, i) => subsets(from.slice(i + 1), size - 1).map((rest) => [first, ...rest]));
}
