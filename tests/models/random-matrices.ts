import fc from 'fast-check';
import { matrixFromRows, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Sparse matrices of up to the given size, rows and columns of weight zero among them. */
export function sparseMatrices(maxRows: number, maxCols: number, maxWeight = 6): fc.Arbitrary<SparseMatrix> {
  return fc.integer({ min: 1, max: maxCols }).chain((cols) =>
    fc
      .array(fc.uniqueArray(fc.nat(cols - 1), { maxLength: Math.min(cols, maxWeight) }), {
        minLength: 1,
        maxLength: maxRows,
      })
      .map((rows) => matrixFromRows(cols, rows)),
  );
}
