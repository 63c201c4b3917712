import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { FileBytes } from './byte-source.ts';
import { JsonScanner } from './json-scanner.ts';
import { keepLists, ListCount, type ListVisitor } from './lists-read-twice.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import type { ScanMark } from './text-scanner.ts';

/** The matrix as `{rows, columns, ones, countedFrom: 0, onesByRow: [[…], …]}`, one row a line, after anything that says
 *  where it comes from. */
export function writeJson(H: SparseMatrix, provenance: Readonly<Record<string, unknown>> = {}): Uint8Array {
  const head = { ...provenance, rows: H.rows, columns: H.cols, ones: H.colIndex.length, countedFrom: 0 };
  const rows = Array.from(
    { length: H.rows },
    (_, i) => `    [${H.colIndex.subarray(H.rowStart[i], H.rowStart[i + 1]).join(', ')}]`,
  );
  const text = JSON.stringify(head, null, 2).replace(/\n}$/, `,\n  "onesByRow": [\n${rows.join(',\n')}\n  ]\n}\n`);
  return new TextEncoder().encode(text);
}

/** Reads such a file where it lies; other keys are passed over, and keys may stand in any order.
 *  @throws FormatError with the place of what is wrong; LimitError on size. */
export function readJson(file: FileBytes): SparseMatrix {
  const scan = new JsonScanner(file);
  const stated: Record<string, { value: number; line: number }> = {};
  const count = new ListCount();
  let place: ScanMark | undefined;
  scan.object((key) => {
    const { line } = scan.text;
    if (key === 'columns' || key === 'rows' || key === 'countedFrom')
      stated[key] = { value: scan.wholeNumber(`"${key}" to be a whole number`), line };
    else if (key === 'onesByRow') {
      place = scan.text.mark();
      readRows(scan, count);
    } else scan.skipValue();
  });
  const wrong = (key: string, expected: string, found: unknown) =>
    scan.text.errorAtLine(stated[key]?.line ?? place?.line ?? 1, `"${key}" to be ${expected}`, String(found));
  const { columns, rows, countedFrom } = stated;
  const base = countedFrom?.value ?? 0;
  if (!columns || columns.value < 1) throw wrong('columns', 'a whole number from 1', columns?.value ?? 'nothing');
  if (!place) throw wrong('onesByRow', 'a list of lists of columns', 'nothing');
  if (rows && rows.value !== count.lists) throw wrong('rows', `${count.lists}, the lists given`, rows.value);
  if (base > 1) throw wrong('countedFrom', '0 or 1', base);
  if (count.lists === 0) throw wrong('onesByRow', 'at least one row', '[]');
  refuseBeyondLimits(count.lists, columns.value, count.items);
  if (count.least < base) throw wrong('onesByRow', `lists of columns from ${base}`, count.least);
  if (count.largest >= columns.value + base)
    throw wrong('onesByRow', `lists of columns up to ${columns.value - 1 + base}`, count.largest);
  scan.text.reset(place);
  const { start, items } = keepLists(
    count,
    base,
    (visit) => readRows(scan, visit),
    (expected, found, row) => scan.text.error(`"onesByRow" to be ${expected} columns in rows[${row}]`, found),
  );
  return { rows: count.lists, cols: columns.value, rowStart: start, colIndex: items };
}

/** A list of lists of whole numbers. */
export function readLists(scan: JsonScanner, visit: ListVisitor, key: string, what: string): void {
  const item = `"${key}" to be lists of ${what}, whole numbers from 0`;
  const readItem = () => visit.item(scan.wholeNumber(item));
  scan.list(`"${key}" to be a list of lists of ${what}`, () => {
    visit.begin();
    scan.list(item, readItem);
    visit.end();
  });
}

const readRows = (scan: JsonScanner, visit: ListVisitor) => readLists(scan, visit, 'onesByRow', 'columns');
