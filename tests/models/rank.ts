import type { SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Rank over GF(2) by textbook elimination on rows of bits: the plain twin of every faster rank. */
export function eliminationRank(H: SparseMatrix): number {
  return reducedRows(H).length;
}

/** Independent rows with distinct leading columns that span the row space. */
function reducedRows(H: SparseMatrix): Uint32Array[] {
  const words = Math.ceil(H.cols / 32);
  const pivots: (Uint32Array | undefined)[] = new Array(H.cols).fill(undefined);
  for (let i = 0; i < H.rows; i++) {
    const row = new Uint32Array(words);
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) row[H.colIndex[e]! >>> 5]! ^= 1 << (H.colIndex[e]! & 31);
    for (let c = 0; c < H.cols; c++) {
      if (((row[c >>> 5]! >>> (c & 31)) & 1) === 0) continue;
      const pivot = pivots[c];
      if (!pivot) {
        pivots[c] = row;
        break;
      }
      for (let w = c >>> 5; w < words; w++) row[w]! ^= pivot[w]!;
    }
  }
  return pivots.filter((row) => row !== undefined);
}

/** How many words of each weight every row meets evenly, by listing all 2^k of them in Gray order. */
export function weightDistribution(H: SparseMatrix): Map<number, number> {
  const basis = kernelBasis(H);
  const word = new Uint32Array(Math.ceil(H.cols / 32));
  const counts = new Uint32Array(H.cols + 1);
  counts[0] = 1;
  for (let i = 1; i < 2 ** basis.length; i++) {
    const flip = basis[31 - Math.clz32(i & -i)]!;
    let weight = 0;
    for (let w = 0; w < word.length; w++) {
      word[w]! ^= flip[w]!;
      weight += ones(word[w]!);
    }
    counts[weight]!++;
  }
  return new Map(
    [...counts].map((count, weight): [number, number] => [weight, count]).filter(([, count]) => count > 0),
  );
}

/** The smallest weight of a word other than zero; 0 when there is none. */
export function exhaustiveDistance(H: SparseMatrix): number {
  return [...weightDistribution(H).keys()][1] ?? 0;
}

function kernelBasis(H: SparseMatrix): Uint32Array[] {
  const bit = (row: Uint32Array, c: number) => (row[c >>> 5]! >>> (c & 31)) & 1;
  const rows = reducedRows(H);
  const leads = rows.map((row) => Array.from({ length: H.cols }, (_, c) => c).find((c) => bit(row, c) === 1)!);
  const free = Array.from({ length: H.cols }, (_, c) => c).filter((c) => !leads.includes(c));
  return free.map((f) => {
    const word = new Uint32Array(Math.ceil(H.cols / 32));
    word[f >>> 5]! |= 1 << (f & 31);
    for (let i = rows.length - 1; i >= 0; i--) {
      let parity = 0;
      for (let w = 0; w < word.length; w++) parity ^= ones(word[w]! & rows[i]![w]!) & 1;
      if (parity) word[leads[i]! >>> 5]! ^= 1 << (leads[i]! & 31);
    }
    return word;
  });
}

function ones(bits: number): number {
  let x = bits - ((bits >>> 1) & 0x55555555);
  x = (x & 0x33333333) + ((x >>> 2) & 0x33333333);
  return Math.imul((x + (x >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
