import { systematicEncoder } from '../codes/encode/systematic-encoder.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { Random } from './random.ts';

/** Uniformly random codewords: the information bits are drawn in their order, 32 to a word of the generator from its
 *  lowest bit on, and encoded. */
export function createCodewordSource(H: SparseMatrix, random: Random): () => Uint8Array {
  const encoder = systematicEncoder({ H });
  const info = new Uint8Array(encoder.k);
  return () => {
    let bits = 0;
    for (let i = 0; i < info.length; i++) {
      bits = i % 32 === 0 ? random.next32() : bits >>> 1;
      info[i] = bits & 1;
    }
    return encoder.encode(info);
  };
}
