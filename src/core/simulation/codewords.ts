import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { type BitMatrix, packMatrix } from '../gf2/bit-matrix.ts';
import type { Random } from './random.ts';

/** Uniformly random codewords: the free columns of the reduced matrix are drawn, one bit a free column in ascending
 *  order, 32 to a word of the generator from its lowest bit on, and the pivot columns follow from them. The buffer
 *  returned is used again for the next word. */
export function createCodewordSource(H: SparseMatrix, random: Random): () => Uint8Array {
  const { reduced, pivots } = reduce(H);
  const isPivot = new Uint8Array(H.cols);
  for (const c of pivots) isPivot[c] = 1;
  const free = Array.from({ length: H.cols }, (_, c) => c).filter((c) => !isPivot[c]);
  const packed = new Uint32Array(reduced.stride);
  const word = new Uint8Array(H.cols);
  return () => {
    packed.fill(0);
    let bits = 0;
    free.forEach((c, i) => {
      bits = i % 32 === 0 ? random.next32() : bits >>> 1;
      word[c] = bits & 1;
      if (bits & 1) packed[c >>> 5]! ^= 1 << (c & 31);
    });
    pivots.forEach((c, r) => {
      word[c] = parityOf(reduced.row(r), packed);
    });
    return word;
  };
}

/** Gauss–Jordan form: row r has its first one in column pivots[r], the only one of that column. */
function reduce(H: SparseMatrix): { reduced: BitMatrix; pivots: number[] } {
  const reduced = packMatrix(H);
  const pivots: number[] = [];
  for (let c = 0; c < H.cols && pivots.length < H.rows; c++) {
    const rank = pivots.length;
    let found = rank;
    while (found < H.rows && reduced.get(found, c) === 0) found++;
    if (found === H.rows) continue;
    reduced.swapRows(rank, found);
    for (let r = 0; r < H.rows; r++) if (r !== rank && reduced.get(r, c)) reduced.addRow(r, rank, c >>> 5);
    pivots.push(c);
  }
  return { reduced, pivots };
}

function parityOf(row: Uint32Array, packed: Uint32Array): number {
  let sum = 0;
  for (let w = 0; w < row.length; w++) sum ^= row[w]! & packed[w]!;
  sum ^= sum >>> 16;
  sum ^= sum >>> 8;
  sum ^= sum >>> 4;
  return (0x6996 >>> (sum & 15)) & 1;
}
