import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { Entries } from './entries.ts';
import type { TextScanner } from './text-scanner.ts';

/** Rows from unordered (row, column) pairs, by counting sort. `base` is what both count from.
 *  @throws FormatError when a pair stands twice: over GF(2) two ones would cancel, so it is never silently merged. */
export function matrixFromEntries(
  rows: number,
  cols: number,
  entries: Entries,
  scan: Pick<TextScanner, 'error'>,
  base = 0,
): SparseMatrix {
  const rowStart = new Uint32Array(rows + 1);
  entries.each((row) => {
    rowStart[row - base + 1]!++;
  });
  for (let r = 0; r < rows; r++) rowStart[r + 1]! += rowStart[r]!;
  const next = rowStart.slice(0, rows);
  const colIndex = new Uint32Array(entries.count);
  entries.each((row, col) => {
    colIndex[next[row - base]!++] = col - base;
  });
  for (let r = 0; r < rows; r++) {
    const row = colIndex.subarray(rowStart[r], rowStart[r + 1]).sort();
    for (let j = 1; j < row.length; j++) {
      if (row[j] === row[j - 1])
        throw scan.error('each entry once', `row ${r + 1}, column ${row[j]! + 1} twice (counted from 1)`);
    }
  }
  return { rows, cols, rowStart, colIndex };
}
