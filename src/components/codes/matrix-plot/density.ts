import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { CellRange } from './view.ts';

/** Pixels along a tile's side. */
export const TILE = 256;

/** How many ones lie in each square of 2^level × 2^level cells of one tile, row by row; `into` has TILE² entries.
 *  A tile at (tx, ty) starts at column tx·TILE·2^level and row ty·TILE·2^level. */
export function countTile(H: SparseMatrix, level: number, tx: number, ty: number, into: Uint32Array): void {
  into.fill(0);
  const col0 = (tx * TILE) << level;
  const col1 = Math.min(H.cols, ((tx + 1) * TILE) << level);
  const row0 = (ty * TILE) << level;
  const row1 = Math.min(H.rows, ((ty + 1) * TILE) << level);
  for (let r = row0; r < row1; r++) {
    const line = ((r - row0) >> level) * TILE;
    const end = H.rowStart[r + 1]!;
    for (let e = firstAtLeast(H, r, col0); e < end; e++) {
      const c = H.colIndex[e]!;
      if (c >= col1) break;
      into[line + ((c - col0) >> level)]!++;
    }
  }
}

/** Ones inside a range of cells. */
export function onesIn(H: SparseMatrix, range: CellRange): number {
  let ones = 0;
  for (let r = range.row0; r < range.row1; r++) {
    ones += firstAtLeast(H, r, range.col1) - firstAtLeast(H, r, range.col0);
  }
  return ones;
}

/** Place in colIndex of row r's first one at or right of a column; the row's end when there is none. */
export function firstAtLeast(H: SparseMatrix, r: number, col: number): number {
  let low = H.rowStart[r]!;
  let high = H.rowStart[r + 1]!;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (H.colIndex[middle]! < col) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** The count that is drawn in full ink: three times the mean of a square, at least one, so that a lone one shows. */
export function fullShade(H: SparseMatrix, level: number): number {
  const mean = (H.colIndex.length / (H.rows * H.cols)) * 4 ** level;
  return Math.max(1, Math.ceil(3 * mean));
}
