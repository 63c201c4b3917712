import { LimitError } from '../../errors.ts';
import { circulantOf, cyclicRank } from '../../gf2/cyclic.ts';
import { independentRows } from '../../gf2/independent-rows.ts';
import { matrixFromRows, rowOf, type SparseMatrix } from '../sparse-matrix.ts';

/** Word operations that finding independent rows may take: about ten seconds. */
const MOST_STEPS = 1e10;

/** The rows of H without those that rows above them span. Of a circulant the first ones are a basis: its rows are the
 *  multiples of one polynomial.
 *  @throws LimitError when the search would take too long. */
export function checkBasis(H: SparseMatrix): SparseMatrix {
  const keep = circulantOf(H) ? Uint32Array.from({ length: cyclicRank(H)! }, (_, r) => r) : searched(H);
  return matrixFromRows(
    H.cols,
    Array.from(keep, (r) => rowOf(H, r)),
  );
}

function searched(H: SparseMatrix): Uint32Array {
  const steps = (H.rows * Math.min(H.rows, H.cols) * H.cols) / 64;
  if (steps > MOST_STEPS) throw new LimitError('independent rows of a matrix', steps, MOST_STEPS, 'steps');
  return independentRows(H);
}
