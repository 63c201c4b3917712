import { type SparseMatrix, transpose } from '../../sparse-matrix.ts';

/** Rows of M = HᵀH over the integers, entry (c, d) the number of checks that columns c and d share; and M applied to a
 *  vector. */
export interface Overlaps {
  n: number;
  /** Row c of M. */
  row(c: number): Float64Array;
  /** M·x. */
  times(x: Float64Array): Float64Array;
}

export function overlapsOf(H: SparseMatrix): Overlaps {
  const T = transpose(H);
  return {
    n: H.cols,
    row(c) {
      const row = new Float64Array(H.cols);
      for (let e = T.rowStart[c]!; e < T.rowStart[c + 1]!; e++) {
        const r = T.colIndex[e]!;
        for (let f = H.rowStart[r]!; f < H.rowStart[r + 1]!; f++) row[H.colIndex[f]!]!++;
      }
      return row;
    },
    times: (x) => product(T, product(H, x)),
  };
}

function product({ rows, rowStart, colIndex }: SparseMatrix, x: Float64Array): Float64Array {
  const y = new Float64Array(rows);
  for (let r = 0; r < rows; r++) {
    let sum = 0;
    for (let e = rowStart[r]!; e < rowStart[r + 1]!; e++) sum += x[colIndex[e]!]!;
    y[r] = sum;
  }
  return y;
}
