import type { Orbits } from '../tanner-orbits.ts';
import type { Overlaps } from './overlaps.ts';

/** Exact largest eigenvalue of M = HᵀH on the vectors of sum zero, when M has at most two eigenvalues there: M = aI + λJ for
 *  2-designs, M² = αM + βI + γJ for generalised quadrangles, partial geometries, nets and the like (Bose 1963). The relation
 *  is checked in whole numbers on the row of one column of each orbit, which is all rows. Null when it does not hold.
 *  For columns of one weight and rows of one weight. */
export function quadraticEigenvalue(
  overlaps: Overlaps,
  columns: Orbits,
): { value: number; relation: 'M = aI + λJ' | 'M² = αM + βI + γJ' } | null {
  const lambda = constantOverlap(overlaps, columns);
  if (lambda) return { value: lambda.diagonal - lambda.off, relation: 'M = aI + λJ' };
  let relation: Relation | null = null;
  for (const c of columns.representatives) {
    const row = overlaps.row(c);
    const square = overlaps.times(row);
    relation ??= relationFrom(row, square, c);
    if (!relation || !holds(relation, row, square, c)) return null;
  }
  if (!relation) return null;
  const { alpha, beta } = relation;
  const root = Math.sqrt(alpha * alpha + 4 * beta);
  // A root that is no whole number is rounded up, so that the value stays an upper bound.
  const value = (alpha + (Number.isInteger(root) ? root : root * (1 + 4 * Number.EPSILON))) / 2;
  return { value, relation: 'M² = αM + βI + γJ' };
}

function constantOverlap(overlaps: Overlaps, columns: Orbits): { diagonal: number; off: number } | null {
  let found: { diagonal: number; off: number } | null = null;
  for (const c of columns.representatives) {
    const row = overlaps.row(c);
    const off = row[c === 0 ? 1 : 0]!;
    found ??= { diagonal: row[c]!, off };
    const { diagonal, off: common } = found;
    if (!row.every((value, d) => value === (d === c ? diagonal : common))) return null;
  }
  return found;
}

interface Relation {
  alpha: number;
  beta: number;
  gamma: number;
}

/** Solves the relation on one row; its coefficients are whole numbers when both eigenvalues occur. */
function relationFrom(row: Float64Array, square: Float64Array, c: number): Relation | null {
  const first = c === 0 ? 1 : 0;
  const other = row.findIndex((value, d) => d !== c && value !== row[first]);
  if (other < 0) return null;
  const alpha = (square[other]! - square[first]!) / (row[other]! - row[first]!);
  const gamma = square[first]! - alpha * row[first]!;
  const beta = square[c]! - alpha * row[c]! - gamma;
  return Number.isInteger(alpha) && alpha * alpha + 4 * beta >= 0 ? { alpha, beta, gamma } : null;
}

function holds({ alpha, beta, gamma }: Relation, row: Float64Array, square: Float64Array, c: number): boolean {
  return square.every((value, d) => value === alpha * row[d]! + gamma + (d === c ? beta : 0));
}
