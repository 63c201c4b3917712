import { ParamError } from '../errors.ts';

/** A matrix over GF(2), ones only, by rows: row i has its ones at colIndex[rowStart[i] .. rowStart[i+1]), ascending. */
export interface SparseMatrix {
  rows: number;
  cols: number;
  rowStart: Uint32Array;
  colIndex: Uint32Array;
}

/** Columns of row i holding a one, ascending; a view without a copy. */
export function rowOf(H: SparseMatrix, i: number): Uint32Array {
  return H.colIndex.subarray(H.rowStart[i], H.rowStart[i + 1]);
}

/** Packs rows given as lists of columns. A column named twice in a row is refused, not cancelled.
 *  @throws ParamError naming the row. */
export function matrixFromRows(cols: number, rows: readonly ArrayLike<number>[]): SparseMatrix {
  const rowStart = new Uint32Array(rows.length + 1);
  for (let i = 0; i < rows.length; i++) rowStart[i + 1] = rowStart[i]! + rows[i]!.length;
  const colIndex = new Uint32Array(rowStart[rows.length]!);
  for (let i = 0; i < rows.length; i++) {
    const target = colIndex.subarray(rowStart[i], rowStart[i + 1]);
    target.set(rows[i]!);
    target.sort();
    for (let j = 0; j < target.length; j++) {
      if (target[j]! >= cols || (j > 0 && target[j] === target[j - 1])) {
        throw new ParamError(`rows[${i}]`, target[j], `distinct columns from 0 to ${cols - 1}`);
      }
    }
  }
  return { rows: rows.length, cols, rowStart, colIndex };
}

/** The transpose, in time linear in the ones; rows of the result come out ascending. */
export function transpose(H: SparseMatrix): SparseMatrix {
  const rowStart = new Uint32Array(H.cols + 1);
  for (const c of H.colIndex) rowStart[c + 1]!++;
  for (let c = 0; c < H.cols; c++) rowStart[c + 1]! += rowStart[c]!;
  const next = rowStart.slice(0, H.cols);
  const colIndex = new Uint32Array(H.colIndex.length);
  for (let r = 0; r < H.rows; r++) {
    for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) colIndex[next[H.colIndex[e]!]!++] = r;
  }
  return { rows: H.cols, cols: H.rows, rowStart, colIndex };
}

/** H·word over GF(2): one byte 0 or 1 a row.
 *  @throws ParamError when the word's length is not the number of columns. */
export function syndrome(H: SparseMatrix, word: Uint8Array): Uint8Array {
  if (word.length !== H.cols) throw new ParamError('word', word.length, `a word of ${H.cols} bits`);
  const s = new Uint8Array(H.rows);
  for (let i = 0; i < H.rows; i++) {
    let sum = 0;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
    s[i] = sum & 1;
  }
  return s;
}
