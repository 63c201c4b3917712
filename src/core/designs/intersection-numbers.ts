import { type BlockDesign, blockOf } from './block-design.ts';

/** How many other blocks meet one block in 0, 1, 2, … points. Linear in the blocks. */
export function intersectionNumbersOf(design: BlockDesign, block: number): Map<number, number> {
  const marked = new Uint8Array(design.v);
  for (const p of blockOf(design, block)) marked[p] = 1;
  const counts = new Map<number, number>();
  for (let i = 0; i < design.b; i++) {
    if (i === block) continue;
    let common = 0;
    for (const p of blockOf(design, i)) common += marked[p]!;
    counts.set(common, (counts.get(common) ?? 0) + 1);
  }
  return new Map([...counts].sort(([a], [b]) => a - b));
}

/** Unordered pairs of blocks by the number of points they share. Quadratic in the blocks. */
export function blockIntersections(design: BlockDesign): Map<number, number> {
  const twice = new Map<number, number>();
  for (let i = 0; i < design.b; i++) {
    for (const [size, count] of intersectionNumbersOf(design, i)) twice.set(size, (twice.get(size) ?? 0) + count);
  }
  return new Map([...twice].sort(([a], [b]) => a - b).map(([size, count]) => [size, count / 2]));
}
