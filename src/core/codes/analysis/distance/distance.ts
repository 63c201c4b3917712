import type { Enclosure, Graded } from '../../../evidence.ts';
import type { AnalysableCode } from '../../analyse-ldpc.ts';
import { cyclicGenerator } from '../../encode/generator-polynomial.ts';
import { geometryDistance } from './geometry.ts';
import { treeBound } from './tree-bound.ts';

/** How hard to look for the distance: `theorems` only; or bounds found in well under a second as well. */
export type DistanceEffort = 'theorems' | 'quick';

/** What the analysis knows of the code already. */
export interface DistanceFacts {
  k: number;
  /** Even; Infinity for a forest. */
  girth: number;
  cyclic: boolean;
  leastColumnWeight: number;
}

export function distanceOf(code: AnalysableCode, facts: DistanceFacts): Graded<Enclosure> {
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
  const tree = treeBound(facts.girth, facts.leastColumnWeight);
  const singleton = n - facts.k + 1;
  const word = facts.cyclic ? generatorWeight(code) : singleton;
  const upper = Math.min(singleton, word);
  const lower = Math.min(tree.value, upper);
  const upperMethod = upper === word && facts.cyclic ? 'weight of the generator polynomial' : 'Singleton bound';
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
