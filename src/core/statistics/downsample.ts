/** What a mark needs to be thinned out: where it stands, and whether it is an upper bound for want of errors. */
export interface Placed {
  x: number;
  y: number;
  isBound: boolean;
}

/** Thins marks, sorted by x, to a handful a bucket of `bucketWidth`, so that a hundred thousand points draw as fast as a
 *  hundred. In each bucket the first, the last, the highest and the lowest measured marks stay, and so do the highest
 *  and the lowest upper bound: no extreme and no zero-error region vanishes from the picture. Order is kept; nothing is
 *  averaged, every mark that remains is a measured one. Few marks are returned as they are. */
export function downsample<T extends Placed>(marks: readonly T[], bucketWidth: number, leaveBelow = 400): readonly T[] {
  if (marks.length <= leaveBelow) return marks;
  const kept: T[] = [];
  let start = 0;
  while (start < marks.length) {
    const bucket = Math.floor(marks[start]!.x / bucketWidth);
    let end = start + 1;
    while (end < marks.length && Math.floor(marks[end]!.x / bucketWidth) === bucket) end++;
    for (const index of extremesOf(marks, start, end)) kept.push(marks[index]!);
    start = end;
  }
  return kept;
}

/** Indices to keep from marks[start … end − 1], ascending. */
function extremesOf(marks: readonly Placed[], start: number, end: number): number[] {
  const kept = new Set<number>();
  for (const isBound of [false, true]) {
    let top = -1;
    let bottom = -1;
    let last = -1;
    for (let i = start; i < end; i++) {
      const mark = marks[i]!;
      if (mark.isBound !== isBound) continue;
      if (last < 0 && !isBound) kept.add(i);
      if (top < 0 || mark.y < marks[top]!.y) top = i;
      if (bottom < 0 || mark.y > marks[bottom]!.y) bottom = i;
      last = i;
    }
    if (last < 0) continue;
    kept.add(top).add(bottom);
    if (!isBound) kept.add(last);
  }
  return [...kept].sort((a, b) => a - b);
}
