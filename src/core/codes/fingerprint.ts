import type { SparseMatrix } from './sparse-matrix.ts';

/** Hex SHA-256 over little-endian 32-bit words: rows, cols, then for each row its weight followed by its columns in
 *  ascending order. The same matrix has the same fingerprint on every machine. */
export function fingerprint(H: SparseMatrix): Promise<string> {
  return digest(H, []);
}

/** Number of rows that no matrix has. */
const WORDS = 0xffffffff;

/** The same of the words of a constant-weight code as rows, after one word of 32 ones: a code of these words is another
 *  code than the one that these rows check. */
export function wordsFingerprint(words: SparseMatrix): Promise<string> {
  return digest(words, [WORDS]);
}

async function digest(H: SparseMatrix, before: readonly number[]): Promise<string> {
  const bytes = new ArrayBuffer(4 * (before.length + 2 + H.rows + H.colIndex.length));
  const view = new DataView(bytes);
  let at = 0;
  const put = (word: number) => {
    view.setUint32(at, word, true);
    at += 4;
  };
  for (const word of before) put(word);
  put(H.rows);
  put(H.cols);
  for (let i = 0; i < H.rows; i++) {
    const from = H.rowStart[i]!;
    const to = H.rowStart[i + 1]!;
    put(to - from);
    for (let e = from; e < to; e++) put(H.colIndex[e]!);
  }
  const hash = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes));
  return Array.from(hash, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
