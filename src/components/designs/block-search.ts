import { type BlockDesign, blockOf } from '@/core/designs/block-design.ts';

export type Typed<T> = { ok: true; value: T } | { ok: false; error: string };

/** Reads points as typed, "3 17" or "3, 17"; nothing typed is no points. */
export function pointsFrom(text: string, v: number): Typed<number[]> {
  const parts = text.split(/[\s,;]+/).filter(Boolean);
  const points = parts.map((part) => wholeBelow(part, v));
  return points.includes(null)
    ? { ok: false, error: `points from 0 to ${v - 1}, with spaces between` }
    : { ok: true, value: [...new Set(points as number[])] };
}

/** Reads one block's number. */
export function blockFrom(text: string, b: number): Typed<number | null> {
  if (text.trim() === '') return { ok: true, value: null };
  const block = wholeBelow(text.trim(), b);
  return block === null ? { ok: false, error: `a block from 0 to ${b - 1}` } : { ok: true, value: block };
}

function wholeBelow(text: string, limit: number): number | null {
  if (!/^\d{1,9}$/.test(text)) return null;
  const value = Number(text);
  return value < limit ? value : null;
}

/** Numbers of the blocks that hold all the points and, where one is asked for, are of that group; ascending. */
export function blocksWith(
  design: BlockDesign,
  points: readonly number[],
  group?: { of: ArrayLike<number>; number: number },
): Uint32Array {
  const found: number[] = [];
  for (let i = 0; i < design.b; i++) {
    if (group && group.of[i] !== group.number) continue;
    const block = blockOf(design, i);
    if (points.every((p) => holds(block, p))) found.push(i);
  }
  return Uint32Array.from(found);
}

/** Blocks are ascending, so halving finds a point. */
function holds(block: Uint32Array, point: number): boolean {
  let low = 0;
  let high = block.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (block[middle]! < point) low = middle + 1;
    else high = middle;
  }
  return block[low] === point;
}
