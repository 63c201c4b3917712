import { createHash } from 'node:crypto';
import { deflateRawSync, inflateRawSync } from 'node:zlib';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';

/** The byte sequence that the fingerprint is taken over (little-endian words: rows, cols, then each row's weight and
 *  columns), deflated. */
export function packMatrix(H: SparseMatrix): Buffer {
  const bytes = Buffer.alloc(4 * (2 + H.rows + H.colIndex.length));
  let at = bytes.writeUInt32LE(H.cols, bytes.writeUInt32LE(H.rows, 0));
  for (let i = 0; i < H.rows; i++) {
    const from = H.rowStart[i]!;
    const to = H.rowStart[i + 1]!;
    at = bytes.writeUInt32LE(to - from, at);
    for (let e = from; e < to; e++) at = bytes.writeUInt32LE(H.colIndex[e]!, at);
  }
  return deflateRawSync(bytes, { level: 6 });
}

/** The matrix of a blob. @throws Error when the bytes end early or run over. */
export function unpackMatrix(blob: Uint8Array): SparseMatrix {
  const bytes = inflateRawSync(blob);
  const rows = bytes.readUInt32LE(0);
  const cols = bytes.readUInt32LE(4);
  const rowStart = new Uint32Array(rows + 1);
  const colIndex = new Uint32Array(bytes.length / 4 - 2 - rows);
  let at = 8;
  for (let i = 0; i < rows; i++) {
    const weight = bytes.readUInt32LE(at);
    at += 4;
    const from = rowStart[i]!;
    for (let e = from; e < from + weight; e++, at += 4) colIndex[e] = bytes.readUInt32LE(at);
    rowStart[i + 1] = from + weight;
  }
  if (at !== bytes.length) throw new Error(`A stored matrix of ${bytes.length} bytes should have ${at}.`);
  return { rows, cols, rowStart, colIndex };
}

export const sha256Hex = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');
