import { ParamError } from '../../errors.ts';
import { columnWeightProfile, rowWeightProfile } from '../analysis/weights.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';

/** Fractions of the Tanner graph's edges by the degree of the node they end at. */
export type DegreeFractions = readonly (readonly [degree: number, fraction: number])[];

/** Degree pair of an ensemble: columns (bits) and rows (checks), from the edges' point of view. */
export interface EdgeDegrees {
  columns: DegreeFractions;
  rows: DegreeFractions;
}

/** All columns of weight dv, all rows of weight dc.
 *  @throws ParamError unless dv ≥ 2 and dc ≥ 2 are whole. */
export function regularDegrees(dv: number, dc: number): EdgeDegrees {
  if (!Number.isInteger(dv) || dv < 2) throw new ParamError('dv', dv, 'a column weight of 2 or more');
  if (!Number.isInteger(dc) || dc < 2) throw new ParamError('dc', dc, 'a row weight of 2 or more');
  return { columns: [[dv, 1]], rows: [[dc, 1]] };
}

export function edgeDegreesOf(H: SparseMatrix): EdgeDegrees {
  const fractions = (profile: [number, number][]): DegreeFractions =>
    profile
      .filter(([degree]) => degree > 0)
      .map(([degree, count]) => [degree, (degree * count) / H.colIndex.length] as const);
  return { columns: fractions(columnWeightProfile(H)), rows: fractions(rowWeightProfile(H)) };
}

/** Σ fraction·f(degree). */
export function averageOver(fractions: DegreeFractions, f: (degree: number) => number): number {
  return fractions.reduce((sum, [degree, fraction]) => sum + fraction * f(degree), 0);
}
