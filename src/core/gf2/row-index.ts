import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';

/** A look-up from a set of columns, in any order, to the row that holds exactly these and is not marked as taken; −1 when
 *  there is none.
 *  Hashing only narrows the search, every hit is compared in full. */
export function rowIndex(H: SparseMatrix): (columns: Uint32Array, taken?: Uint8Array) => number {
  const buckets = new Map<number, number[]>();
  for (let r = 0; r < H.rows; r++) {
    const key = hash(rowOf(H, r));
    const bucket = buckets.get(key);
    if (bucket) bucket.push(r);
    else buckets.set(key, [r]);
  }
  const mark = new Uint32Array(H.cols);
  let stamp = 0;
  return (columns, taken) => {
    const bucket = buckets.get(hash(columns));
    if (!bucket) return -1;
    stamp++;
    for (const c of columns) mark[c] = stamp;
    return (
      bucket.find((r) => {
        if (taken?.[r]) return false;
        const row = rowOf(H, r);
        return row.length === columns.length && row.every((c) => mark[c] === stamp);
      }) ?? -1
    );
  };
}

/** Order-free: the sum of a scrambled word per column, in 53 bits. */
function hash(columns: Uint32Array): number {
  let low = 0;
  let high = 0;
  for (const c of columns) {
    let x = Math.imul(c + 1, 0x9e3779b1);
    x = Math.imul(x ^ (x >>> 15), 0x85ebca6b);
    low = (low + (x ^ (x >>> 13))) | 0;
    high = (high + Math.imul(x ^ (x >>> 16), 0xc2b2ae35)) | 0;
  }
  return (low >>> 0) + (high >>> 11) * 2 ** 32;
}
