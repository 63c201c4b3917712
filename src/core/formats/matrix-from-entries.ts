import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { Entries } from './entries.ts';
import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';
import type { TextScanner } from './text-scanner.ts';

/** Rows from unordered (row, column) pairs, by counting sort: gone through once to count and once to place, so that beside
 *  the matrix nothing is held. `base` is what both count from.
 *  @throws FormatError when a pair stands twice: over GF(2) two ones would cancel, so it is never silently merged; LimitError
 *  on more pairs than a matrix may have. */
export function matrixFromEntries(
  rows: number,
  cols: number,
  entries: Entries,
  scan: Pick<TextScanner, 'error'>,
  base = 0,
): SparseMatrix {
  const rowStart = new Uint32Array(rows + 1);
  let ones = 0;
  entries.each((row) => {
    if (++ones > matrixLimits.ones) refuseBeyondLimits(0, 0, ones);
    rowStart[row - base + 1]!++;
  });
  for (let r = 0; r < rows; r++) rowStart[r + 1]! += rowStart[r]!;
  const next = rowStart.slice(0, rows);
  const colIndex = new Uint32Array(ones);
  entries.each((row, col) => {
    colIndex[next[row - base]!++] = col - base;
  });
  for (let r = 0; r < rows; r++) {
    if (next[r] !== rowStart[r + 1]) throw scan.error('a file that stays as it is', 'one that changed on the way');
    const row = colIndex.subarray(rowStart[r], rowStart[r + 1]);
    if (!rises(row)) row.sort();
    for (let j = 1; j < row.length; j++) {
      if (row[j] === row[j - 1])
        throw scan.error('each entry once', `row ${r + 1}, column ${row[j]! + 1} twice (counted from 1)`);
    }
  }
  return { rows, cols, rowStart, colIndex };
}

function rises(row: Uint32Array): boolean {
  for (let j = 1; j < row.length; j++) if (row[j]! <= row[j - 1]!) return false;
  return true;
}
