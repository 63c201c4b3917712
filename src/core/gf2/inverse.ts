import { BitMatrix } from './bit-matrix.ts';

/** The inverse of a square matrix over GF(2) by Gauss–Jordan elimination, or null when it is singular. */
export function nullableInverse(matrix: BitMatrix): BitMatrix | null {
  const size = matrix.rows;
  const work = new BitMatrix(size, size);
  work.words.set(matrix.words);
  const inverse = new BitMatrix(size, size);
  for (let i = 0; i < size; i++) inverse.flip(i, i);
  for (let c = 0; c < size; c++) {
    let pivot = c;
    while (pivot < size && !work.get(pivot, c)) pivot++;
    if (pivot === size) return null;
    work.swapRows(pivot, c);
    inverse.swapRows(pivot, c);
    for (let r = 0; r < size; r++) {
      if (r === c || !work.get(r, c)) continue;
      work.addRow(r, c);
      inverse.addRow(r, c);
    }
  }
  return inverse;
}
