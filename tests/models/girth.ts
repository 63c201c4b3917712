import { type SparseMatrix, transpose } from '../../src/core/codes/sparse-matrix.ts';

/** The shortest cycle of the Tanner graph by breadth-first search from every column; 0 when there is none. */
export function breadthFirstGirth(H: SparseMatrix): number {
  const T = transpose(H);
  const neighbours = (x: number) =>
    x < H.cols
      ? [...T.colIndex.subarray(T.rowStart[x], T.rowStart[x + 1])].map((row) => H.cols + row)
      : [...H.colIndex.subarray(H.rowStart[x - H.cols], H.rowStart[x - H.cols + 1])];
  let girth = 0;
  for (let root = 0; root < H.cols && girth !== 4; root++) {
    const distance = new Map([[root, 0]]);
    const parent = new Map<number, number>();
    const queue = [root];
    for (let x = queue.shift(); x !== undefined; x = queue.shift()) {
      if (girth > 0 && 2 * distance.get(x)! >= girth) break;
      for (const y of neighbours(x)) {
        if (!distance.has(y)) {
          distance.set(y, distance.get(x)! + 1);
          parent.set(y, x);
          queue.push(y);
        } else if (parent.get(x) !== y) {
          const cycle = distance.get(x)! + distance.get(y)! + 1;
          if (girth === 0 || cycle < girth) girth = cycle;
        }
      }
    }
  }
  return girth;
}
