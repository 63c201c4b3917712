import { ParamError } from '../errors.ts';

/** Capacity of the binary erasure channel, 1 − e bits a use (Elias 1955).
 *  @throws ParamError unless 0 ≤ e ≤ 1. */
export function becCapacity(e: number): number {
  if (!(e >= 0 && e <= 1)) throw new ParamError('e', e, 'a probability from 0 to 1');
  return 1 - e;
}

/** Channel dispersion, e(1 − e) bits² (Polyanskiy, Poor and Verdú 2010, Theorem 53). */
export const becDispersion = (e: number): number => e * (1 - e);
