import { LimitError } from '../errors.ts';
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

/** Meetings of two blocks on a point that may be counted: about a minute. */
export const MAX_MEETINGS = 2e10;

/** Unordered pairs of blocks by the number of points they share. Each block visits the later blocks on its points, so the
 *  time is Σ C(r_p, 2) over the points. `onProgress` is told the share done, a hundred times at most.
 *  @throws LimitError when that passes MAX_MEETINGS. */
export function blockIntersections(design: BlockDesign, onProgress?: (share: number) => void): Map<number, number> {
  const { b, blockStart, blockPoints } = design;
  const { start, blocks } = blocksOnPoints(design);
  const meetings = meetingsOf(start);
  if (meetings > MAX_MEETINGS)
    throw new LimitError('block intersections', meetings, MAX_MEETINGS, 'meetings of blocks');
  const next = start.slice(0, design.v);
  const common = new Uint32Array(b);
  const met = new Uint32Array(b);
  const pairs = new Map<number, number>();
  const add = (size: number, count: number) => pairs.set(size, (pairs.get(size) ?? 0) + count);
  const stride = Math.ceil(b / 100);
  for (let i = 0; i < b; i++) {
    let metCount = 0;
    for (let e = blockStart[i]!; e < blockStart[i + 1]!; e++) {
      const p = blockPoints[e]!;
      next[p]!++;
      for (let at = next[p]!; at < start[p + 1]!; at++) {
        const j = blocks[at]!;
        if (common[j]!++ === 0) met[metCount++] = j;
      }
    }
    for (let at = 0; at < metCount; at++) {
      add(common[met[at]!]!, 1);
      common[met[at]!] = 0;
    }
    const apart = b - 1 - i - metCount;
    if (apart > 0) add(0, apart);
    if (i % stride === 0) onProgress?.(i / b);
  }
  return new Map([...pairs].sort(([a], [b]) => a - b));
}

const meetingsOf = (start: Uint32Array) => {
  let meetings = 0;
  for (let p = 0; p + 1 < start.length; p++)
    meetings += ((start[p + 1]! - start[p]!) * (start[p + 1]! - start[p]! - 1)) / 2;
  return meetings;
};

/** Blocks on each point, ascending: those of p are blocks[start[p] .. start[p+1]). */
function blocksOnPoints({ v, b, blockStart, blockPoints }: BlockDesign): { start: Uint32Array; blocks: Uint32Array } {
  const start = new Uint32Array(v + 1);
  for (const p of blockPoints) start[p + 1]!++;
  for (let p = 0; p < v; p++) start[p + 1]! += start[p]!;
  const next = start.slice(0, v);
  const blocks = new Uint32Array(blockPoints.length);
  for (let i = 0; i < b; i++)
    for (let e = blockStart[i]!; e < blockStart[i + 1]!; e++) blocks[next[blockPoints[e]!]!++] = i;
  return { start, blocks };
}
