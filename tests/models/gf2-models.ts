import { matrixFromRows, rowOf, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Rank by elimination on rows held as big integers: slow, and too plain to be wrong. */
export function plainRank(H: SparseMatrix): number {
  const rows = Array.from({ length: H.rows }, (_, r) => rowOf(H, r).reduce((sum, c) => sum ^ (1n << BigInt(c)), 0n));
  let rank = 0;
  for (let c = 0; c < H.cols; c++) {
    const bit = 1n << BigInt(c);
    const at = rows.findIndex((row, i) => i >= rank && (row & bit) !== 0n);
    if (at < 0) continue;
    [rows[rank], rows[at]] = [rows[at]!, rows[rank]!];
    for (let i = 0; i < rows.length; i++) if (i !== rank && (rows[i]! & bit) !== 0n) rows[i]! ^= rows[rank]!;
    rank++;
  }
  return rank;
}

/** The n × n matrix whose row i holds the offsets moved i places to the right. */
export function circulantMatrix(n: number, offsets: readonly number[]): SparseMatrix {
  return matrixFromRows(
    n,
    Array.from({ length: n }, (_, i) => offsets.map((d) => (d + i) % n)),
  );
}

/** All words of {c : H·c = 0} for a matrix of 20 columns or fewer, as integers. */
export function allCodewords(H: SparseMatrix): number[] {
  const checks = Array.from({ length: H.rows }, (_, r) => rowOf(H, r).reduce((sum, c) => sum | (1 << c), 0));
  const words: number[] = [];
  for (let word = 0; word < 2 ** H.cols; word++) {
    if (checks.every((check) => parity(check & word) === 0)) words.push(word);
  }
  return words;
}

function parity(word: number): number {
  let sum = 0;
  for (let w = word; w !== 0; w &= w - 1) sum ^= 1;
  return sum;
}

/** A matrix of circulants of one size: base[r][b] lists the offsets of the first row of block (r, b). */
export function quasiCyclicMatrix(size: number, base: readonly (readonly (readonly number[])[])[]): SparseMatrix {
  return matrixFromRows(
    base[0]!.length * size,
    base.flatMap((row) =>
      Array.from({ length: size }, (_, x) =>
        row.flatMap((offsets, b) => offsets.map((offset) => b * size + ((offset + x) % size))),
      ),
    ),
  );
}
