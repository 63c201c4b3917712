import { primePowersUpTo } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { EnumerationWindow } from '../family.ts';

/** Largest geometry of flats that is built here. */
export const MAX_FLAT_POINTS = 100_000;
export const MAX_FLAT_INCIDENCES = 10_000_000;

export interface FlatParams {
  /** Dimension of the geometry. */
  m: number;
  q: number;
  /** Dimension of the flats that are the blocks. */
  flat: number;
}

/** @throws ParamError when flats are not proper, LimitError when the geometry is larger than what is built. */
export function requireFlats({ m, flat }: FlatParams, size: { v: number; b: number; k: number }): void {
  if (flat >= m) throw new ParamError('flat', flat, `a dimension from 1 to ${m - 1}, below that of the geometry`);
  if (size.v > MAX_FLAT_POINTS) throw new LimitError('a geometry', size.v, MAX_FLAT_POINTS, 'points');
  const incidences = size.b * size.k;
  if (incidences > MAX_FLAT_INCIDENCES) {
    throw new LimitError('a geometry of flats', incidences, MAX_FLAT_INCIDENCES, 'incidences');
  }
}

/** Every m, q and flat whose counts fit the window and the limits, by growing order of the field. From dimension three:
 *  planes are families of their own. */
export function* flatsWithin(
  { maxPoints, maxBlocks }: EnumerationWindow,
  counts: (params: FlatParams) => { v: number; b: number; k: number },
): Generator<FlatParams> {
  const points = Math.min(maxPoints, MAX_FLAT_POINTS);
  for (const q of primePowersUpTo(Math.ceil(Math.cbrt(points)))) {
    for (let m = 3; counts({ m, q, flat: 1 }).v <= points; m++) {
      for (let flat = 1; flat < m; flat++) {
        const { b, k } = counts({ m, q, flat });
        if (b <= maxBlocks && b * k <= MAX_FLAT_INCIDENCES) yield { m, q, flat };
      }
    }
  }
}
