import { ParamError } from '../../../errors.ts';
import type { Enclosure, Graded } from '../../../evidence.ts';
import type { AnalysableCode } from '../../analyse-ldpc.ts';
import { cyclicGenerator } from '../../encode/generator-polynomial.ts';
import { overlapSpectrum } from '../spectrum/second-eigenvalue.ts';
import type { TannerOrbits } from '../tanner-orbits.ts';
import { findDistance } from './exact-distance.ts';
import { geometryDistance } from './geometry.ts';
import { searchLowWeight } from './low-weight-search.ts';
import { lowerBounds } from './lower-bounds.ts';
import { weightDistribution } from './weight-distribution.ts';

/** How hard to look for the distance, by name or as the operations on words of 32 bits that may be spent, some 10^8 a second
 *  and more. `theorems` computes nothing but what formulas need. */
export type DistanceEffort = 'theorems' | 'quick' | 'thorough' | { wordOperations: number };

/** What an effort may spend. */
export interface DistanceLimits {
  /** Largest dimension, of code or dual, whose words are all visited. */
  dimension: number;
  wordOperations: number;
  /** Operations on the eigenvalues of HᵀH. */
  eigenvalueOperations: number;
  /** Longest code that is searched, since a search begins with a dense elimination. */
  length: number;
}

export const distanceEfforts: Readonly<Record<'theorems' | 'quick' | 'thorough', DistanceLimits>> = {
  theorems: { dimension: 0, wordOperations: 0, eigenvalueOperations: 0, length: 0 },
  quick: { dimension: 18, wordOperations: 5e7, eigenvalueOperations: 3e7, length: 1500 },
  thorough: { dimension: 26, wordOperations: 3e9, eigenvalueOperations: 3e9, length: 20_000 },
};

/** What the analysis knows of the code already. */
export interface DistanceFacts {
  k: number;
  /** Even; Infinity for a forest. */
  girth: number;
  cyclic: boolean;
  leastColumnWeight: number;
  orbits: TannerOrbits;
  /** Where it was counted. */
  weightFourWords?: Graded<number>;
  /** Told the share of the budget spent by a search. */
  onProgress?(share: number): void;
}

/** Lower and upper value of the distance of {c : H·c = 0}, with both methods.
 *  @throws ParamError on an unknown effort. */
export function distanceOf(
  code: AnalysableCode,
  facts: DistanceFacts,
  effort: DistanceEffort = 'quick',
): Graded<Enclosure> {
  const limits = limitsOf(effort);
  const n = code.H.cols;
  if (facts.k === 0) {
    return {
      value: { lower: 0, upper: 0 },
      grade: 'proved',
      method: 'no codeword but zero: the distance is not defined',
    };
  }
  const plain = (code.transforms?.length ?? 0) === 0;
  const exact = plain && code.checks ? geometryDistance(code.design, code.checks) : null;
  if (exact) return { ...exact, value: { lower: exact.value, upper: exact.value } };
  if (Math.min(facts.k, n - facts.k) <= limits.dimension) {
    const { counts, method } = weightDistribution(code.H);
    const [, least] = [...counts.keys()];
    return { value: { lower: least!, upper: least! }, grade: 'computed', method };
  }
  if (limits.wordOperations > distanceEfforts.quick.wordOperations && n <= limits.length) {
    const { wordOperations } = limits;
    return findDistance(code.H, facts, { wordOperations, onProgress: facts.onProgress })!.distance;
  }
  return enclosed(code, facts, limits);
}

function limitsOf(effort: DistanceEffort): DistanceLimits {
  if (typeof effort === 'string') {
    const named = distanceEfforts[effort];
    if (named) return named;
  } else if (effort?.wordOperations >= 0) {
    const { wordOperations } = effort;
    const { dimension, length } = distanceEfforts.thorough;
    // Visiting all words of a code of dimension d takes 2^d times a few words.
    const affordable = Math.min(dimension, Math.floor(Math.log2(wordOperations / 8 + 1)));
    return { dimension: affordable, wordOperations, eigenvalueOperations: wordOperations, length };
  }
  throw new ParamError('distance', effort, '"theorems", "quick", "thorough" or { wordOperations }');
}

function enclosed(code: AnalysableCode, facts: DistanceFacts, limits: DistanceLimits): Graded<Enclosure> {
  const { H } = code;
  const n = H.cols;
  const operations = limits.eigenvalueOperations;
  const spectrum = operations > 0 ? overlapSpectrum(H, facts.orbits, { operations }) : null;
  // Roots of unity cost a field; they are asked only when something is to be computed at all.
  const bound = lowerBounds(H, { ...facts, cyclic: facts.cyclic && operations > 0, spectrum })[0]!;
  const four = operations > 0 ? facts.weightFourWords : undefined;
  const below = four?.value === 0 && bound.value < 6 ? noPasch(bound, four) : bound;
  const uppers: [number, string][] = [[n - facts.k + 1, 'Singleton bound']];
  if (four?.value) uppers.push([4, `${four.value} words of weight 4, Pasch configurations`]);
  if (facts.cyclic) uppers.push([generatorWeight(code), 'weight of the generator polynomial']);
  if (n <= limits.length && Math.min(...uppers.map(([weight]) => weight)) > below.value) {
    const { wordOperations } = limits;
    const word = searchLowWeight(H, { seed: 'distance', wordOperations, goal: below.value });
    if (word) uppers.push([word.weight, 'a codeword found by information-set search']);
  }
  const [upper, upperMethod] = uppers.reduce((best, next) => (next[0] < best[0] ? next : best));
  const lower = Math.min(below.value, upper);
  return {
    value: { lower, upper },
    grade: lower === upper ? 'proved' : 'bounded',
    method: `below: ${below.method}; above: ${upperMethod}`,
    source: below.source,
  };
}

/** Columns of weight 3 make all weights even, and weight 4 is ruled out. */
const noPasch = (bound: Graded<number>, { source }: Graded<number>): Graded<number> => ({
  ...bound,
  value: 6,
  method: 'no Pasch configuration, so no word of weight 4, and all words are even',
  source,
});

function generatorWeight({ H }: AnalysableCode): number {
  const g = cyclicGenerator(H);
  if (!g) return H.cols;
  let weight = 0;
  for (const word of g) for (let w = word; w !== 0; w &= w - 1) weight++;
  return weight;
}
