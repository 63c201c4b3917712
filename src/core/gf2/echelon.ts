import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { BitMatrix } from './bit-matrix.ts';

/** The reduced echelon form of a matrix over GF(2): `rank` rows, row i alone holding a one in column pivots[i]. */
export interface ReducedEchelon {
  rank: number;
  /** Column of each row's pivot, in the order the pivots were taken. */
  pivots: Uint32Array;
  /** The first `rank` rows are the form; columns keep their numbers. */
  matrix: BitMatrix;
}

/** Gauss–Jordan elimination that takes pivots from the columns in the order given (ascending without one), so that the
 *  columns late in the order are left free.
 *  @throws LimitError when the packed matrix does not fit. */
export function reducedEchelon(H: SparseMatrix, order?: Uint32Array): ReducedEchelon {
  const most = Math.min(H.rows, H.cols);
  const matrix = new BitMatrix(most + 1, H.cols);
  const pivots: number[] = [];
  for (let r = 0; r < H.rows && pivots.length < most; r++) {
    const at = pivots.length;
    for (const c of rowOf(H, r)) matrix.flip(at, c);
    clearPivots(matrix, at, pivots);
    const pivot = firstOne(matrix, at, order);
    if (pivot < 0) continue;
    for (let i = 0; i < at; i++) if (matrix.get(i, pivot)) matrix.addRow(i, at);
    pivots.push(pivot);
  }
  return { rank: pivots.length, pivots: Uint32Array.from(pivots), matrix };
}

function clearPivots(matrix: BitMatrix, row: number, pivots: readonly number[]): void {
  pivots.forEach((pivot, i) => {
    if (matrix.get(row, pivot)) matrix.addRow(row, i);
  });
}

function firstOne(matrix: BitMatrix, row: number, order?: Uint32Array): number {
  if (order) return order.find((c) => matrix.get(row, c) === 1) ?? -1;
  const words = matrix.row(row);
  const w = words.findIndex((word) => word !== 0);
  return w < 0 ? -1 : 32 * w + 31 - Math.clz32(words[w]! & -words[w]!);
}

/** A basis of the null space of the matrix whose reduced form is given, one row a free column, ascending; and the free
 *  columns, each of which is one in its own row alone. */
export function nullSpace({ rank, pivots, matrix }: ReducedEchelon): { basis: BitMatrix; free: Uint32Array } {
  const n = matrix.cols;
  const isPivot = new Uint8Array(n);
  for (const c of pivots) isPivot[c] = 1;
  const free = Uint32Array.from({ length: n }, (_, c) => c).filter((c) => !isPivot[c]);
  const basis = new BitMatrix(free.length, n);
  free.forEach((column, i) => {
    basis.flip(i, column);
    for (let r = 0; r < rank; r++) if (matrix.get(r, column)) basis.flip(i, pivots[r]!);
  });
  return { basis, free };
}
