import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { type FileBytes, sizeOf } from './byte-source.ts';
import { EntryList } from './entries.ts';
import { matrixFromEntries } from './matrix-from-entries.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

const banner = '%%MatrixMarket matrix coordinate pattern general';

/** Matrix Market coordinate pattern (Boisvert, Pozo, Remington 1996, NISTIR 5935): banner, `rows cols ones`, then one
 *  `row column` a line, counted from 1. */
export function writeMatrixMarket(H: SparseMatrix): Uint8Array {
  const out = new TextWriter();
  out.text(`${banner}\n`);
  out.number(H.rows).text(' ').number(H.cols).text(' ').number(H.colIndex.length).text('\n');
  for (let i = 0; i < H.rows; i++) {
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) {
      out
        .number(i + 1)
        .text(' ')
        .number(H.colIndex[e]! + 1)
        .text('\n');
    }
  }
  return out.finish();
}

/** Reads `coordinate pattern general`, and `coordinate integer general` with every value 0 or 1.
 *  @throws FormatError with line and column; @throws LimitError on a size that passes matrixLimits. */
export function readMatrixMarket(file: FileBytes): SparseMatrix {
  const scan = new TextScanner(file);
  const first = scan.restOfLine().trim().toLowerCase().replace(/\s+/g, ' ');
  const hasValues = first === banner.toLowerCase().replace('pattern', 'integer');
  if (!hasValues && first !== banner.toLowerCase())
    throw scan.errorAtLine(
      1,
      `the line "${banner}" (or integer in place of pattern)`,
      JSON.stringify(first.slice(0, 60)),
    );
  while (!scan.atEnd() && scan.peek() === 37) scan.restOfLine();
  const rows = scan.number('the number of rows');
  const cols = scan.number('the number of columns', false);
  const ones = scan.number('the number of entries', false);
  refuseBeyondLimits(rows, cols, ones);
  if (rows === 0 || cols === 0) throw scan.error('at least one row and one column', `${rows} × ${cols}`);
  if (4 * ones > sizeOf(file)) throw scan.error('as many entries as the file has room for', String(ones));
  const entries = new EntryList();
  // Said once: a sentence an entry would take longer than the entries.
  const aRow = `one of ${ones} entries: a row from 1 to ${rows}`;
  const aColumn = `a column from 1 to ${cols}`;
  for (let e = 0; e < ones; e++) {
    while (!scan.atEnd() && scan.peek() === 37) scan.restOfLine();
    const row = inRange(scan, scan.number(aRow), rows, 'row');
    const col = inRange(scan, scan.number(aColumn, false), cols, 'column');
    const value = hasValues ? scan.number('a value 0 or 1', false) : 1;
    if (value > 1) throw scan.error('a value 0 or 1', String(value));
    if (!scan.atLineEnd()) throw scan.error('the end of the line', scan.tokenAt());
    if (value === 0) continue;
    entries.push(row, col);
  }
  if (!scan.atEnd()) throw scan.error(`the end of the file after ${ones} entries`, scan.tokenAt());
  return matrixFromEntries(rows, cols, entries, scan);
}

function inRange(scan: TextScanner, index: number, limit: number, what: string): number {
  if (index < 1 || index > limit) throw scan.error(`a ${what} from 1 to ${limit}; indices count from 1`, String(index));
  return index - 1;
}
