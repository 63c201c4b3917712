import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError } from '../errors.ts';
import { decodeText } from './decode-text.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';

/** FNV-1a (Fowler, Noll, Vo), 32 bits, over the little-endian words rows, cols, row starts, column indices. A reader in C
 *  needs four lines for it; it finds accidents, not malice. */
export function headerChecksum(H: SparseMatrix): number {
  let hash = 0x811c9dc5;
  const word = (value: number) => {
    for (let shift = 0; shift < 32; shift += 8) hash = Math.imul(hash ^ ((value >>> shift) & 255), 0x01000193);
  };
  word(H.rows);
  word(H.cols);
  H.rowStart.forEach(word);
  H.colIndex.forEach(word);
  return hash >>> 0;
}

/** A C99 header: sizes as macros, row starts and column indices as const tables, a checksum over both. */
export function writeCHeader(H: SparseMatrix): Uint8Array {
  const text = `/* Parity-check matrix over GF(2), ones only, by rows; indices count from 0.
 * Row i has its ones at columns H_COL_INDEX[e], H_ROW_START[i] <= e < H_ROW_START[i + 1].
 * H_CHECKSUM is FNV-1a (32 bit) over the little-endian 32-bit words
 * H_ROWS, H_COLS, H_ROW_START[0..H_ROWS], H_COL_INDEX[0..H_ONES-1].
 * Made by Blockwright; the manifest beside it names construction and digests. */
#ifndef BLOCKWRIGHT_PARITY_CHECK_MATRIX_H
#define BLOCKWRIGHT_PARITY_CHECK_MATRIX_H

#include <stdint.h>

#define H_ROWS ${H.rows}u
#define H_COLS ${H.cols}u
#define H_ONES ${H.colIndex.length}u
#define H_CHECKSUM 0x${headerChecksum(H).toString(16).padStart(8, '0')}u

static const uint32_t H_ROW_START[H_ROWS + 1] = {
${lines(H.rowStart)}
};

/* One entry at least, since C has no empty tables. */
static const uint32_t H_COL_INDEX[H_ONES ? H_ONES : 1] = {
${lines(H.colIndex.length === 0 ? [0] : H.colIndex)}
};

#endif
`;
  return new TextEncoder().encode(text);
}

/** Reads a header written so, and holds it against its checksum.
 *  @throws FormatError naming what is missing, malformed or altered; LimitError on size. */
export function readCHeader(bytes: Uint8Array): SparseMatrix {
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

function lines(values: ArrayLike<number>): string {
  const rows: string[] = [];
  for (let i = 0; i < values.length; i += 16)
    rows.push(`  ${Array.from({ length: Math.min(16, values.length - i) }, (_, j) => values[i + j]).join(', ')}`);
  return rows.join(',\n');
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
