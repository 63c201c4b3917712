import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { rowOf } from '../codes/sparse-matrix.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { rowIndex } from '../gf2/row-index.ts';

/** Whether moving the columns by this permutation gives the same set of rows, repeated rows counted. */
export function mapsRowsOntoThemselves(H: SparseMatrix, permutation: Uint32Array): boolean {
  return symmetryTest(H)(permutation);
}

function symmetryTest(H: SparseMatrix): (permutation: Uint32Array) => boolean {
  const find = rowIndex(H);
  return (permutation) => {
    const taken = new Uint8Array(H.rows);
    for (let i = 0; i < H.rows; i++) {
      const image = find(
        rowOf(H, i).map((c) => permutation[c]!),
        taken,
      );
      if (image < 0) return false;
      taken[image] = 1;
    }
    return true;
  };
}

/** Multipliers tried on cyclic codes; 2 is one of every cyclic code over GF(2), but the set of rows need not keep it. */
const multipliers = [2, 3, 5, 7, 11, 13];

/** Column permutations found in the matrix itself, each checked against all rows: the shift by one within blocks of Z
 *  columns, for the largest Z that works (Z = n is a cyclic code), and with Z = n the multipliers c → m·c mod n.
 *  Nothing found means nothing known, not that there is none. */
export function symmetryOf(H: SparseMatrix): Uint32Array[] {
  const keeps = symmetryTest(H);
  const n = H.cols;
  for (let size = n; size > 1; size--) {
    if (n % size !== 0) continue;
    const shift = Uint32Array.from({ length: n }, (_, c) => c - (c % size) + ((c + 1) % size));
    if (!keeps(shift)) continue;
    return size < n ? [shift] : [shift, ...multiplierPermutations(n).filter(keeps)];
  }
  return [];
}

function multiplierPermutations(n: number): Uint32Array[] {
  return multipliers
    .filter((m) => m < n && n % m !== 0)
    .map((m) => Uint32Array.from({ length: n }, (_, c) => (m * c) % n));
}

/** Whether a decoder treats all columns alike, so that patterns that a symmetry carries into each other end alike. Not
 *  so where checks or bits are taken in index order: layered min-sum, and the lowest index at a tie. */
export function followsSymmetry(decoder: DecoderSpec): boolean {
  switch (decoder.kind) {
    case 'min-sum':
      return decoder.schedule === 'flooding';
    case 'gradient-descent':
      return decoder.flips !== 'single';
    case 'two-stage':
      return decoder.stages.every(followsSymmetry);
    default:
      return true;
  }
}
