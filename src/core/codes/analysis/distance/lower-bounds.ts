import type { Graded } from '../../../evidence.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import type { OverlapSpectrum } from '../spectrum/second-eigenvalue.ts';
import { columnWeightProfile } from '../weights.ts';
import { bchBound } from './bch-bound.ts';
import { bitOrientedBound, parityOrientedBound } from './eigenvalue-bounds.ts';
import { treeBound } from './tree-bound.ts';

export interface LowerBoundFacts {
  girth: number;
  leastColumnWeight: number;
  cyclic: boolean;
  /** Left out where eigenvalues were not looked for. */
  spectrum?: OverlapSpectrum | null;
}

/** Every lower bound on the distance that applies, the best first. When all columns have odd weight the sum of all checks
 *  is the all-one word, so all codewords have even weight and each bound rises to the next even number. */
export function lowerBounds(H: SparseMatrix, { girth, leastColumnWeight, cyclic, spectrum }: LowerBoundFacts) {
  const bounds: Graded<number>[] = [treeBound(girth, leastColumnWeight)];
  if (spectrum) {
    const eigenvalue = [bitOrientedBound(H.cols, spectrum), parityOrientedBound(H.cols, spectrum)];
    bounds.push(...eigenvalue.filter((bound) => bound !== null));
  }
  const bch = cyclic ? bchBound(H) : null;
  if (bch) bounds.push(bch);
  const even = columnWeightProfile(H).every(([weight]) => weight % 2 === 1);
  return bounds.map((bound) => (even ? raisedToEven(bound) : bound)).sort((a, b) => b.value - a.value);
}

function raisedToEven(bound: Graded<number>): Graded<number> {
  if (bound.value % 2 === 0) return bound;
  const method = `${bound.method}; all words are even, as all columns have odd weight`;
  return { ...bound, value: bound.value + 1, method };
}
