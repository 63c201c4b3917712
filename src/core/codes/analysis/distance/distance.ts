import { ParamError } from '../../../errors.ts';
import type { Enclosure, Graded } from '../../../evidence.ts';
import type { AnalysableCode } from '../../analyse-ldpc.ts';
import { cyclicGenerator } from '../../encode/generator-polynomial.ts';
import { geometryDistance } from './geometry.ts';
import { searchLowWeight } from './low-weight-search.ts';
import { treeBound } from './tree-bound.ts';
import { weightDistribution } from './weight-distribution.ts';

/** How hard to look for the distance: by `theorems` only; `quick`, with all words of small codes and a seeded search of
 *  about half a second; `thorough`, the same with some twenty times as much. */
export type DistanceEffort = 'theorems' | 'quick' | 'thorough';

/** For each effort: the largest dimension whose words are all visited, the words the search may touch, and the longest
 *  code it is tried on, since it begins with a dense elimination. */
const EFFORTS = {
  theorems: { dimension: 0, wordOperations: 0, length: 0 },
  quick: { dimension: 18, wordOperations: 1e8, length: 1500 },
  thorough: { dimension: 26, wordOperations: 3e9, length: 20_000 },
} as const;

/** What the analysis knows of the code already. */
export interface DistanceFacts {
  k: number;
  /** Even; Infinity for a forest. */
  girth: number;
  cyclic: boolean;
  leastColumnWeight: number;
}

/** Lower and upper value of the distance of {c : H·c = 0}, with both methods. */
export function distanceOf(
  code: AnalysableCode,
  facts: DistanceFacts,
  effort: DistanceEffort = 'quick',
): Graded<Enclosure> {
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
  const limits = EFFORTS[effort];
  if (!limits) throw new ParamError('distance', effort, '"theorems", "quick" or "thorough"');
  if (Math.min(facts.k, n - facts.k) <= limits.dimension) {
    const { counts, method } = weightDistribution(code.H);
    const [, least] = [...counts.keys()];
    return { value: { lower: least!, upper: least! }, grade: 'computed', method };
  }
  return enclosed(code, facts, limits);
}

function enclosed(
  code: AnalysableCode,
  facts: DistanceFacts,
  limits: { wordOperations: number; length: number },
): Graded<Enclosure> {
  const n = code.H.cols;
  const tree = treeBound(facts.girth, facts.leastColumnWeight);
  const uppers: [number, string][] = [[n - facts.k + 1, 'Singleton bound']];
  if (facts.cyclic) uppers.push([generatorWeight(code), 'weight of the generator polynomial']);
  if (n <= limits.length) {
    const word = searchLowWeight(code.H, { seed: 'distance', wordOperations: limits.wordOperations });
    if (word) uppers.push([word.weight, 'a codeword found by information-set search']);
  }
  const [upper, upperMethod] = uppers.reduce((best, next) => (next[0] < best[0] ? next : best));
  const lower = Math.min(tree.value, upper);
  return {
    value: { lower, upper },
    grade: lower === upper ? 'proved' : 'bounded',
    method: `below: ${tree.method}; above: ${upperMethod}`,
    source: tree.source,
  };
}

function generatorWeight({ H }: AnalysableCode): number {
  const g = cyclicGenerator(H);
  if (!g) return H.cols;
  let weight = 0;
  for (const word of g) for (let w = word; w !== 0; w &= w - 1) weight++;
  return weight;
}
