import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { FileBytes } from './byte-source.ts';
import { EntryList } from './entries.ts';
import { matrixFromEntries } from './matrix-from-entries.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

const header = 'row,column';

/** One `row,column` a line, counted from 0, under a first line that states the size, since the last rows or columns may
 *  hold no one, and a second that names the columns. */
export function writeCsv(H: SparseMatrix): Uint8Array {
  const out = new TextWriter();
  out.text('# rows=').number(H.rows).text(' columns=').number(H.cols).text(' counted-from=0\n').text(`${header}\n`);
  for (let i = 0; i < H.rows; i++) {
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) out.number(i).text(',').number(H.colIndex[e]!).text('\n');
  }
  return out.finish();
}

interface Preamble {
  rows?: number;
  cols?: number;
  countedFrom?: 0 | 1;
}

/** Reads files with or without the size line. Without it the size is the largest index; whether counting starts at 0 or 1
 *  is then told by an index 0, and where none stands the file is refused, since both would be possible.
 *  @throws FormatError with line and column; LimitError on a size that passes matrixLimits. */
export function readCsv(file: FileBytes): SparseMatrix {
  const scan = new TextScanner(file);
  if (scan.atEnd()) throw scan.error(`the line "${header}"`, 'the end of the file');
  const preamble = readPreamble(scan);
  const entries = new EntryList();
  while (!scan.atEnd()) {
    const row = scan.number('a row index');
    if (!scan.skipChar(',')) throw scan.error('a comma after the row index', scan.tokenAt());
    const col = scan.number('a column index', false);
    if (!scan.atLineEnd()) throw scan.error('the end of the line', scan.tokenAt());
    refuseOutside(scan, preamble, row, col);
    entries.push(row, col);
  }
  const base = preamble.countedFrom ?? toldBase(scan, entries);
  const rows = preamble.rows ?? entries.largestRow + 1 - base;
  const cols = preamble.cols ?? entries.largestCol + 1 - base;
  if (rows === 0 || cols === 0) throw scan.error('at least one entry, or a line "# rows=… columns=…"', 'neither');
  refuseBeyondLimits(rows, cols, entries.count);
  return matrixFromEntries(rows, cols, entries, scan, base);
}

function readPreamble(scan: TextScanner): Preamble {
  const preamble: Preamble = {};
  while (scan.peek() === 35) {
    const line = scan.line;
    const text = scan.restOfLine();
    for (const [, key, digits] of text.matchAll(/\b(rows|columns|counted-from)=(\d+)/g)) {
      const value = Number(digits);
      if (key === 'rows') preamble.rows = value;
      else if (key === 'columns') preamble.cols = value;
      else if (value === 0 || value === 1) preamble.countedFrom = value;
      else throw scan.errorAtLine(line, 'counted-from=0 or counted-from=1', digits!);
    }
    if (scan.atEnd()) break;
  }
  if (preamble.rows !== undefined && preamble.cols !== undefined) {
    refuseBeyondLimits(preamble.rows, preamble.cols, 0);
    preamble.countedFrom ??= 0;
  }
  const first = scan.peek();
  if (first >= 48 && first <= 57) return preamble;
  const line = scan.line;
  const names = scan.restOfLine().trim().toLowerCase().replaceAll(' ', '');
  if (names !== header) throw scan.errorAtLine(line, `the line "${header}"`, JSON.stringify(names.slice(0, 40)));
  return preamble;
}

function refuseOutside(scan: TextScanner, { rows, cols, countedFrom = 0 }: Preamble, row: number, col: number): void {
  if (rows !== undefined && (row < countedFrom || row >= rows + countedFrom))
    throw scan.error(
      `a row from ${countedFrom} to ${rows - 1 + countedFrom}; indices count from ${countedFrom}`,
      String(row),
    );
  if (cols !== undefined && (col < countedFrom || col >= cols + countedFrom))
    throw scan.error(
      `a column from ${countedFrom} to ${cols - 1 + countedFrom}; indices count from ${countedFrom}`,
      String(col),
    );
}

function toldBase(scan: TextScanner, entries: EntryList): 0 {
  if (entries.hasZero) return 0;
  throw scan.errorAtLine(
    1,
    'a line "# rows=… columns=… counted-from=0" (or 1): no index is 0, so the start of counting cannot be told',
    'none',
  );
}
