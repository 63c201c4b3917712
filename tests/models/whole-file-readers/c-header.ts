import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError } from '@/core/errors.ts';
import { headerChecksum } from '@/core/formats/c-header.ts';
import { decodeText } from '@/core/formats/decode-text.ts';
import { refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';

/** Reads a C header by regular expressions over all its text, and holds it against its checksum.
 *  @throws FormatError naming what is missing, malformed or altered; LimitError on size. */
export function wholeCHeader(bytes: Uint8Array): SparseMatrix {
  const text = decodeText(bytes);
  const lineOf = (at: number) => text.slice(0, Math.max(0, at)).split('\n').length;
  const macro = (name: string) => {
    const match = new RegExp(`#define\\s+${name}\\s+(0x[0-9a-f]+|\\d+)u?\\b`, 'i').exec(text);
    if (!match) throw new FormatError(1, 1, `a line "#define ${name} …"`, text === '' ? 'an empty file' : 'none');
    return { value: Number(match[1]), line: lineOf(match.index) };
  };
  const rows = macro('H_ROWS');
  const cols = macro('H_COLS');
  const ones = macro('H_ONES');
  refuseBeyondLimits(rows.value, cols.value, ones.value);
  if (rows.value < 1 || cols.value < 1) throw new FormatError(rows.line, 1, 'at least one row and one column', 'none');
  const rowStart = table(text, 'H_ROW_START', rows.value + 1, lineOf);
  const colIndex = table(text, 'H_COL_INDEX', Math.max(1, ones.value), lineOf).subarray(0, ones.value);
  const H = { rows: rows.value, cols: cols.value, rowStart, colIndex: Uint32Array.from(colIndex) };
  const sum = macro('H_CHECKSUM');
  if (!isSound(H) || headerChecksum(H) !== sum.value)
    throw new FormatError(sum.line, 1, 'tables that the checksum confirms', 'tables that were altered');
  return H;
}

function table(text: string, name: string, count: number, lineOf: (at: number) => number): Uint32Array {
  const from = text.indexOf(`const uint32_t ${name}[`);
  const open = text.indexOf('{', from);
  const close = text.indexOf('}', open);
  if (from < 0 || open < 0 || close < 0) throw new FormatError(1, 1, `a table ${name}`, 'none');
  const entries = text
    .slice(open + 1, close)
    .split(',')
    .map((part) => part.trim());
  const bad = entries.findIndex((part) => !/^\d{1,10}$/.test(part));
  if (bad >= 0)
    throw new FormatError(lineOf(open), 1, `whole numbers in ${name}`, JSON.stringify(entries[bad]!.slice(0, 20)));
  if (entries.length !== count)
    throw new FormatError(lineOf(open), 1, `${count} entries in ${name}`, String(entries.length));
  return Uint32Array.from(entries, Number);
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
