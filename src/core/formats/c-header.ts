import type { SparseMatrix } from '../codes/sparse-matrix.ts';

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

function lines(values: ArrayLike<number>): string {
  const rows: string[] = [];
  for (let i = 0; i < values.length; i += 16)
    rows.push(`  ${Array.from({ length: Math.min(16, values.length - i) }, (_, j) => values[i + j]).join(', ')}`);
  return rows.join(',\n');
}
