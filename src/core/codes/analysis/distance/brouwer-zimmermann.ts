import type { Citation } from '../../../errors.ts';
import { type BitMatrix, popcount32 } from '../../../gf2/bit-matrix.ts';
import { nullSpace, reducedEchelon } from '../../../gf2/echelon.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import { disjointInformationSets, type InformationSet } from './information-sets.ts';

export const zimmermann: Citation = {
  authors: 'M. Grassl',
  year: 2006,
  title: 'Searching for linear codes with large minimum distance',
  where: 'in Discovering Mathematics with Magma, Springer, 287–313',
  part: 'the algorithm of Brouwer and Zimmermann',
};

export interface EnumeratedDistance {
  lower: number;
  upper: number;
  /** Positions of a word of weight `upper`. */
  word: Uint32Array;
  /** Every sum of at most this many rows was visited, of each generator matrix. */
  rowsSummed: number;
  informationSets: number;
  wordOperations: number;
}

/** Distance of {c : H·c = 0} by visiting sums of 1, 2, … rows of generator matrices with disjoint information sets. Once all
 *  sums of w rows are visited, a word not seen has w + 1 ones or more in each information set, less what the set lacks of
 *  full rank; when that sum reaches the least weight seen, it is the distance. Stops before a round that would pass the
 *  budget of word operations, with what is proved by then. Null when k = 0. */
export function enumerateDistance(
  H: SparseMatrix,
  options: { wordOperations: number; onProgress?(state: { lower: number; upper: number; share: number }): void },
): EnumeratedDistance | null {
  const { basis } = nullSpace(reducedEchelon(H));
  const k = basis.rows;
  if (k === 0) return null;
  const sets = disjointInformationSets(basis);
  const divisor = commonDivisor(basis);
  const best = { weight: basis.cols + 1, word: new Uint32Array(basis.stride) };
  const state = { lower: 1, spent: 0, summed: 0 };
  for (let w = 1; w <= k; w++) {
    for (const [i, { matrix }] of sets.entries()) {
      const cost = combinations(k, w) * basis.stride;
      if (state.spent + cost > options.wordOperations && w > 1) return result(state, best, sets.length, basis.cols);
      visitSums(matrix, w, best);
      state.spent += cost;
      state.lower = Math.max(state.lower, raised(provedBelow(sets, k, w, i), divisor));
      options.onProgress?.({
        lower: Math.min(state.lower, best.weight),
        upper: best.weight,
        share: Math.min(1, state.lower / best.weight),
      });
      if (state.lower >= best.weight) return result(state, best, sets.length, basis.cols);
    }
    state.summed = w;
  }
  state.lower = best.weight;
  return result(state, best, sets.length, basis.cols);
}

function result(
  state: { lower: number; spent: number; summed: number },
  best: { weight: number; word: Uint32Array },
  informationSets: number,
  n: number,
): EnumeratedDistance {
  return {
    lower: Math.min(state.lower, best.weight),
    upper: best.weight,
    word: Uint32Array.from({ length: n }, (_, c) => c).filter((c) => (best.word[c >>> 5]! >>> (c & 31)) & 1),
    rowsSummed: state.summed,
    informationSets,
    wordOperations: state.spent,
  };
}

/** Least weight of a word not seen when sums of w rows are done in sets 0..done and of w − 1 rows in the others. */
function provedBelow(sets: readonly InformationSet[], k: number, w: number, done: number): number {
  return sets.reduce((sum, { rank }, i) => sum + Math.max(0, (i <= done ? w + 1 : w) - (k - rank)), 0);
}

const raised = (bound: number, divisor: number) => Math.ceil(bound / divisor) * divisor;

/** 4 when the rows' weights are divisible by 4 and any two share an even number of ones, 2 when all weights are even,
 *  otherwise 1: all words have weights divisible by it. */
function commonDivisor(basis: BitMatrix): 1 | 2 | 4 {
  const weights = Array.from({ length: basis.rows }, (_, r) => weightOf(basis.row(r)));
  if (weights.some((weight) => weight % 2 === 1)) return 1;
  if (weights.some((weight) => weight % 4 !== 0)) return 2;
  for (let a = 0; a < basis.rows; a++) {
    const row = basis.row(a);
    for (let b = 0; b < a; b++) {
      let common = 0;
      const other = basis.row(b);
      for (let w = 0; w < row.length; w++) common += popcount32(row[w]! & other[w]!);
      if (common % 2 === 1) return 2;
    }
  }
  return 4;
}

function weightOf(words: Uint32Array): number {
  let weight = 0;
  for (const word of words) weight += popcount32(word);
  return weight;
}

function combinations(n: number, k: number): number {
  let count = 1;
  for (let i = 1; i <= k; i++) count = (count * (n - k + i)) / i;
  return count;
}

/** Visits the sums of exactly w rows, each partial sum formed once, and keeps the lightest. */
function visitSums({ words, rows, stride }: BitMatrix, w: number, best: { weight: number; word: Uint32Array }): void {
  const signed = new Int32Array(words.buffer);
  const partial = Array.from({ length: w }, () => new Int32Array(stride));
  const descend = (depth: number, from: number) => {
    const sum = partial[depth]!;
    if (depth === w - 1) {
      for (let r = from; r < rows; r++) {
        const at = r * stride;
        let weight = 0;
        for (let i = 0; i < stride; i++) weight += popcount32(sum[i]! ^ signed[at + i]!);
        if (weight < best.weight && weight > 0) {
          best.weight = weight;
          for (let i = 0; i < stride; i++) best.word[i] = sum[i]! ^ signed[at + i]!;
        }
      }
      return;
    }
    const next = partial[depth + 1]!;
    for (let r = from; r <= rows - (w - depth); r++) {
      const at = r * stride;
      for (let i = 0; i < stride; i++) next[i] = sum[i]! ^ signed[at + i]!;
      descend(depth + 1, r + 1);
    }
  };
  descend(0, 0);
}
