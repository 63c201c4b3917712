import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { type FileBytes, sizeOf } from './byte-source.ts';
import { headerChecksum } from './c-header.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';

const HASH = 35;
const STAR = 42;
const SLASH = 47;
const SEMICOLON = 59;
const OPEN = 123;
const CLOSE = 125;
const LONGEST_STATEMENT = 1000;

interface Macro {
  value: number;
  line: number;
}

/** Reads a header as c-header.ts writes it, where it lies, and holds it against its checksum. Comments may stand anywhere
 *  between; sizes come before the tables that have them.
 *  @throws FormatError naming what is missing, malformed or altered; LimitError on size. */
export function readCHeader(file: FileBytes): SparseMatrix {
  const scan = new TextScanner(file);
  const macros = new Map<string, Macro>();
  const tables = new Map<string, Uint32Array>();
  if (scan.atEnd()) throw scan.error('a line "#define H_ROWS …"', 'an empty file');
  while (!scan.atEnd()) {
    if (passedComment(scan)) continue;
    if (scan.peek() === HASH) readDirective(scan, macros);
    else readStatement(scan, (name) => readTable(scan, name, macros, tables, sizeOf(file)));
  }
  const { rows, cols } = sizesFrom(scan, macros, sizeOf(file));
  const sum = macroFrom(scan, macros, 'H_CHECKSUM');
  const [rowStart, colIndex] = ['H_ROW_START', 'H_COL_INDEX'].map((name) => {
    const table = tables.get(name);
    if (!table) throw scan.error(`a table ${name}`, 'none');
    return table;
  }) as [Uint32Array, Uint32Array];
  const H = { rows, cols, rowStart, colIndex };
  if (!isSound(H) || headerChecksum(H) !== sum.value)
    throw scan.errorAtLine(sum.line, 'tables that the checksum confirms', 'tables that were altered');
  return H;
}

function readDirective(scan: TextScanner, macros: Map<string, Macro>): void {
  const { line } = scan;
  const [, name, digits] = /^#\s*define\s+(H_[A-Z]+)\s+(0x[0-9a-f]+|\d+)u?\b/i.exec(scan.restOfLine()) ?? [];
  if (name === undefined) return;
  if (macros.has(name)) throw scan.errorAtLine(line, `"#define ${name}" once`, 'a second one');
  macros.set(name, { value: Number(digits), line });
}

function macroFrom(scan: TextScanner, macros: ReadonlyMap<string, Macro>, name: string): Macro {
  const macro = macros.get(name);
  if (!macro) throw scan.error(`a line "#define ${name} …" before this`, 'none');
  return macro;
}

function sizesFrom(scan: TextScanner, macros: ReadonlyMap<string, Macro>, fileBytes: number) {
  const [rows, cols, ones] = ['H_ROWS', 'H_COLS', 'H_ONES'].map((name) => macroFrom(scan, macros, name)) as [
    Macro,
    Macro,
    Macro,
  ];
  refuseBeyondLimits(rows.value, cols.value, ones.value);
  if (rows.value < 1 || cols.value < 1) throw scan.errorAtLine(rows.line, 'at least one row and one column', 'none');
  // Each entry takes a digit and a comma.
  if (2 * ones.value > fileBytes || 2 * rows.value > fileBytes)
    throw scan.errorAtLine(ones.line, 'as many entries as the file has room for', String(ones.value));
  return { rows: rows.value, cols: cols.value, ones: ones.value };
}

/** Passes over a statement to its end; `onTable` reads what stands in the braces of a table. */
function readStatement(scan: TextScanner, onTable: (name: string) => void): void {
  let text = '';
  for (let byte = scan.peek(); byte !== -1; byte = scan.peek()) {
    if (byte === SLASH && passedComment(scan)) continue;
    scan.take();
    if (byte === SEMICOLON) return;
    if (byte === OPEN) {
      const name = /\bconst\s+uint32_t\s+(\w+)\s*\[/.exec(text)?.[1];
      if (name === 'H_ROW_START' || name === 'H_COL_INDEX') onTable(name);
      else while (scan.peek() !== -1 && scan.take() !== CLOSE);
      text = '';
    } else if (text.length < LONGEST_STATEMENT) text += String.fromCharCode(byte);
  }
}

function readTable(
  scan: TextScanner,
  name: string,
  macros: ReadonlyMap<string, Macro>,
  tables: Map<string, Uint32Array>,
  fileBytes: number,
): void {
  if (tables.has(name)) throw scan.error(`one table ${name}`, 'a second one');
  const { rows, ones } = sizesFrom(scan, macros, fileBytes);
  const count = name === 'H_ROW_START' ? rows + 1 : Math.max(1, ones);
  const table = new Uint32Array(count);
  const anEntry = `whole numbers in ${name}`;
  for (let i = 0; i < count; i++) {
    while (passedComment(scan));
    table[i] = scan.number(anEntry, true, CLOSE);
    while (passedComment(scan));
    const isLast = i === count - 1;
    if (!isLast && !scan.skipChar(',')) throw scan.error(`${count} entries in ${name}`, String(i + 1));
  }
  scan.skipChar(',');
  while (passedComment(scan));
  if (scan.take() !== CLOSE) throw scan.error(`the end of ${name} after ${count} entries`, scan.tokenAt());
  tables.set(name, name === 'H_ROW_START' ? table : table.subarray(0, ones));
}

/** Whether a comment stood here, or white space; past it. */
function passedComment(scan: TextScanner): boolean {
  if (scan.atEnd() || scan.peek() !== SLASH) return false;
  const from = scan.mark();
  scan.take();
  if (scan.peek() === SLASH) {
    scan.restOfLine();
    return true;
  }
  if (scan.peek() !== STAR) {
    scan.reset(from);
    throw scan.error('a comment', scan.tokenAt());
  }
  scan.take();
  for (let before = 0; ; ) {
    const byte = scan.take();
    if (byte === -1) throw scan.error('the end of the comment', 'the end of the file');
    if (before === STAR && byte === SLASH) return true;
    before = byte;
  }
}

/** Starts that never fall and columns that rise inside each row. */
function isSound(H: SparseMatrix): boolean {
  if (H.rowStart[0] !== 0 || H.rowStart[H.rows] !== H.colIndex.length) return false;
  for (let i = 0; i < H.rows; i++) {
    if (H.rowStart[i + 1]! < H.rowStart[i]!) return false;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) {
      if (H.colIndex[e]! >= H.cols || (e > H.rowStart[i]! && H.colIndex[e]! <= H.colIndex[e - 1]!)) return false;
    }
  }
  return true;
}
