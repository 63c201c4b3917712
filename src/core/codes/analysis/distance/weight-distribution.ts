import { LimitError } from '../../../errors.ts';
import { type BitMatrix, popcount32 } from '../../../gf2/bit-matrix.ts';
import { nullSpace, reducedEchelon } from '../../../gf2/echelon.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import { ENUMERATION_LIMIT } from './enumeration-limit.ts';

export interface WeightDistribution {
  /** Weight to number of codewords, ascending; weights without words are left out. */
  counts: Map<number, bigint>;
  method: 'all codewords' | 'all words of the dual, MacWilliams identity';
}

/** Number of codewords of {c : H·c = 0} of each weight, exact. Visits the smaller of code and dual in Gray order.
 *  @throws LimitError when both k and n − k pass ENUMERATION_LIMIT. */
export function weightDistribution(H: SparseMatrix): WeightDistribution {
  const form = reducedEchelon(H);
  const n = H.cols;
  const k = n - form.rank;
  const smaller = Math.min(k, form.rank);
  if (smaller > ENUMERATION_LIMIT) {
    throw new LimitError('weight distribution: smaller of k and n − k', smaller, ENUMERATION_LIMIT, 'dimensions');
  }
  if (k <= form.rank) return { counts: counted(spannedWeights(nullSpace(form).basis, k)), method: 'all codewords' };
  const dual = spannedWeights(form.matrix, form.rank);
  return { counts: counted(macWilliams(dual, n, form.rank)), method: 'all words of the dual, MacWilliams identity' };
}

/** Weights of the 2^dimension sums of the first rows, each reached from the last by adding one row (Gray 1953). */
function spannedWeights(basis: BitMatrix, dimension: number): bigint[] {
  const { stride, words } = basis;
  const histogram = new Float64Array(basis.cols + 1);
  const sum = new Int32Array(stride);
  histogram[0] = 1;
  const last = 2 ** dimension;
  for (let i = 1; i < last; i++) {
    const row = (31 - Math.clz32(i & -i)) * stride;
    let weight = 0;
    for (let w = 0; w < stride; w++) {
      const word = sum[w]! ^ words[row + w]!;
      sum[w] = word;
      weight += popcount32(word);
    }
    histogram[weight]!++;
  }
  return Array.from(histogram, BigInt);
}

/** A_j = 2^−r · Σ_i B_i · K_j(i) for a dual of dimension r, with Krawtchouk's polynomials (MacWilliams 1963). */
function macWilliams(dual: readonly bigint[], n: number, dualDimension: number): bigint[] {
  const totals = new Array<bigint>(n + 1).fill(0n);
  dual.forEach((count, i) => {
    if (count === 0n) return;
    krawtchouk(n, i).forEach((value, j) => {
      totals[j]! += count * value;
    });
  });
  return totals.map((total) => total >> BigInt(dualDimension));
}

/** K_0(i) … K_n(i): the coefficients of (1 − x)^i (1 + x)^(n − i). */
function krawtchouk(n: number, i: number): bigint[] {
  const coefficients = new Array<bigint>(n + 1).fill(0n);
  coefficients[0] = 1n;
  for (let factor = 0; factor < n; factor++) {
    for (let j = factor + 1; j > 0; j--) {
      const lower = coefficients[j - 1]!;
      coefficients[j]! += factor < i ? -lower : lower;
    }
  }
  return coefficients;
}

const counted = (all: readonly bigint[]) =>
  new Map(all.flatMap((count, weight): [number, bigint][] => (count === 0n ? [] : [[weight, count]])));
