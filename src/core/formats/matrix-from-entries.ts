import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { TextScanner } from './text-scanner.ts';

/** Rows from unordered (row, column) pairs counted from 0, by counting sort.
 *  @throws FormatError when a pair stands twice: over GF(2) two ones would cancel, so it is never silently merged. */
export function matrixFromEntries(
  rows: number,
  cols: number,
  rowOf: Uint32Array,
  colOf: Uint32Array,
  scan: Pick<TextScanner, 'error'>,
): SparseMatrix {
  const rowStart = new Uint32Array(rows + 1);
  for (const r of rowOf) rowStart[r + 1]!++;
  for (let r = 0; r < rows; r++) rowStart[r + 1]! += rowStart[r]!;
  const next = rowStart.slice(0, rows);
  const colIndex = new Uint32Array(colOf.length);
  for (let e = 0; e < colOf.length; e++) colIndex[next[rowOf[e]!]!++] = colOf[e]!;
  for (let r = 0; r < rows; r++) {
    const row = colIndex.subarray(rowStart[r], rowStart[r + 1]).sort();
    for (let j = 1; j < row.length; j++) {
      if (row[j] === row[j - 1])
        throw scan.error('each entry once', `row ${r + 1}, column ${row[j]! + 1} twice (counted from 1)`);
    }
  }
  return { rows, cols, rowStart, colIndex };
}
