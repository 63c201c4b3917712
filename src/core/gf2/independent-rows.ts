import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { BitMatrix } from './bit-matrix.ts';

/** Indices of the rows that are not sums of rows above them, ascending: a basis of the row space.
 *  @throws LimitError when the packed basis does not fit. */
export function independentRows(H: SparseMatrix): Uint32Array {
  const most = Math.min(H.rows, H.cols);
  const basis = new BitMatrix(most + 1, H.cols);
  const pivotRow = new Int32Array(H.cols).fill(-1);
  const independent: number[] = [];
  for (let r = 0; r < H.rows && independent.length < most; r++) {
    const at = independent.length;
    basis.row(at).fill(0);
    for (const c of rowOf(H, r)) basis.flip(at, c);
    const lead = reduceRow(basis, at, pivotRow);
    if (lead < 0) continue;
    pivotRow[lead] = at;
    independent.push(r);
  }
  return Uint32Array.from(independent);
}

/** Clears leading ones that have a pivot; the first that has none, or −1. */
function reduceRow(basis: BitMatrix, at: number, pivotRow: Int32Array): number {
  const words = basis.row(at);
  for (let w = 0; w < words.length; w++) {
    while (words[w] !== 0) {
      const column = 32 * w + 31 - Math.clz32(words[w]! & -words[w]!);
      const p = pivotRow[column]!;
      if (p < 0) return column;
      basis.addRow(at, p, w);
    }
  }
  return -1;
}
