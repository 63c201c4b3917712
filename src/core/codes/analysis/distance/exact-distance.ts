import type { Enclosure, Graded } from '../../../evidence.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import { CheckSearch } from '../sets/check-search.ts';
import { overlapSpectrum } from '../spectrum/second-eigenvalue.ts';
import type { TannerOrbits } from '../tanner-orbits.ts';
import { columnWeightProfile } from '../weights.ts';
import { enumerateDistance, zimmermann } from './brouwer-zimmermann.ts';
import { searchLowWeight } from './low-weight-search.ts';
import { lowerBounds } from './lower-bounds.ts';

export interface DistanceKnown {
  girth: number;
  cyclic: boolean;
  orbits: TannerOrbits;
}

export interface DistanceBudget {
  /** Operations on words of 32 bits, some 10^8 to 3·10^8 a second; the parts below share them. */
  wordOperations: number;
  seed?: string;
  onProgress?(share: number): void;
}

export interface DistanceFound {
  distance: Graded<Enclosure>;
  /** Positions of a codeword of the upper weight. */
  word: Uint32Array;
  /** Number of words of that weight, where all of them were met. */
  words?: number;
}

/** Distance of {c : H·c = 0} by all there is: bounds by theorem and eigenvalue, a seeded search for a light word, branch and
 *  bound on the checks, and the enumeration of Brouwer and Zimmermann, each with a share of the budget. Exact when the
 *  two sides meet; what is proved when the budget ends is an enclosure. Null when k = 0. */
export function findDistance(H: SparseMatrix, known: DistanceKnown, budget: DistanceBudget): DistanceFound | null {
  const { wordOperations, seed = 'distance', onProgress } = budget;
  const spectrum = overlapSpectrum(H, known.orbits, { operations: wordOperations });
  const leastColumnWeight = columnWeightProfile(H)[0]![0];
  const best = lowerBounds(H, { ...known, leastColumnWeight, spectrum })[0]!;
  const light = searchLowWeight(H, { seed, wordOperations: wordOperations / 4, goal: best.value });
  if (!light) return null;
  onProgress?.(0.25);
  const state = { lower: Math.min(best.value, light.weight), by: best.method, word: light.positions };
  if (state.lower < light.weight) {
    const listed = branchOnChecks(H, known.orbits, state, {
      nodes: Math.ceil(wordOperations / 60),
      onProgress: (share) => onProgress?.(0.25 + share / 4),
    });
    if (listed) return listed;
  }
  onProgress?.(0.5);
  if (state.lower < state.word.length) {
    const enumerated = enumerateDistance(H, {
      wordOperations: wordOperations / 2,
      onProgress: ({ share }) => onProgress?.(0.5 + share / 2),
    })!;
    if (enumerated.upper < state.word.length) state.word = enumerated.word;
    if (enumerated.lower > state.lower) {
      state.lower = enumerated.lower;
      state.by = enumerationMethod(enumerated);
    }
  }
  const { lower, by, word } = state;
  const exact = lower >= word.length;
  const method = exact ? `${by}; a word of that weight` : `below: ${by}; above: a codeword found`;
  const source = by === best.method ? best.source : zimmermann;
  const grade = exact ? 'computed' : 'bounded';
  return {
    distance: { value: { lower: Math.min(lower, word.length), upper: word.length }, grade, method, source },
    word,
  };
}

function enumerationMethod({ rowsSummed, informationSets }: { rowsSummed: number; informationSets: number }): string {
  return `sums of up to ${rowsSummed} rows of ${informationSets} generator matrices visited`;
}

/** Raises the lower bound weight by weight; the words themselves when a weight that has some was gone through. */
function branchOnChecks(
  H: SparseMatrix,
  orbits: TannerOrbits,
  state: { lower: number; by: string; word: Uint32Array },
  { nodes, onProgress }: { nodes: number; onProgress(share: number): void },
): DistanceFound | null {
  const search = new CheckSearch(H, orbits.columns, 'codeword');
  const even = columnWeightProfile(H).every(([weight]) => weight % 2 === 1);
  let left = nodes;
  for (let size = state.lower; size <= state.word.length && left > 0; size++) {
    // All columns odd: no word of odd weight, and nothing to look for.
    if (even && size % 2 === 1) continue;
    const { sets, count, nodes: spent, finished } = search.ofSize({ size, nodes: left, keep: 1 });
    left -= spent;
    onProgress(1 - left / nodes);
    if (sets.length > 0) {
      const method = 'branch and bound on the checks: none lighter';
      const distance = { value: { lower: size, upper: size }, grade: 'computed' as const, method };
      return { distance, word: sets[0]!, ...(finished && { words: count }) };
    }
    if (!finished) break;
    state.lower = Math.min(size + (even ? 2 : 1), state.word.length);
    state.by = `branch and bound on the checks: no word of weight ${size} or less`;
  }
  return null;
}
