import type { BlockDesign } from '../block-design.ts';

/** The translates of one base block modulo n, block j being base + j: its incidence matrix is a circulant, each row the
 *  one before moved a place to the right. Blocks come out ascending without a sort, so 17 million incidences take the
 *  time of writing them. */
export function developBaseBlock(n: number, base: readonly number[]): BlockDesign {
  const sorted = [...base].sort((x, y) => x - y);
  const k = sorted.length;
  const blockStart = new Uint32Array(n + 1);
  for (let j = 0; j <= n; j++) blockStart[j] = j * k;
  const blockPoints = new Uint32Array(n * k);
  let wrapped = 0; // how many of the base block's largest points pass n when moved by j
  for (let j = 0; j < n; j++) {
    while (wrapped < k && sorted[k - 1 - wrapped]! + j >= n) wrapped++;
    let at = j * k;
    for (let i = k - wrapped; i < k; i++) blockPoints[at++] = sorted[i]! + j - n;
    for (let i = 0; i < k - wrapped; i++) blockPoints[at++] = sorted[i]! + j;
  }
  return { v: n, b: n, blockStart, blockPoints, symmetry: [{ order: n, pointPerm: cyclicShift(n) }] };
}

/** The permutation i → i + 1 modulo n. */
export function cyclicShift(n: number): Uint32Array {
  return Uint32Array.from({ length: n }, (_, i) => (i + 1 === n ? 0 : i + 1));
}
