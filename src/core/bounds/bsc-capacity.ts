import { ParamError } from '../errors.ts';

/** Capacity of the binary symmetric channel, 1 − h(p) bits a use (Shannon 1948).
 *  @throws ParamError unless 0 ≤ p ≤ 1. */
export function bscCapacity(p: number): number {
  if (!(p >= 0 && p <= 1)) throw new ParamError('p', p, 'a probability from 0 to 1');
  const bias = Math.abs(1 - 2 * p);
  // Near one half 1 − h(p) cancels; its series in the bias does not.
  if (bias < 0.05)
    return bias ** 2 * (1 / 2 + bias ** 2 / 12 + bias ** 4 / 30 + bias ** 6 / 56 + bias ** 8 / 90) * Math.LOG2E;
  return 1 - binaryEntropy(p);
}

/** h(p) in bits. */
export function binaryEntropy(p: number): number {
  if (p === 0 || p === 1) return 0;
  return -(p * Math.log(p) + (1 - p) * Math.log1p(-p)) * Math.LOG2E;
}

/** Variance of the information density, p(1 − p)·log2²((1 − p)/p): the channel dispersion, in bits² (Polyanskiy, Poor and
 *  Verdú 2010, (253)). */
export function bscDispersion(p: number): number {
  if (p === 0 || p === 1) return 0;
  return p * (1 - p) * ((Math.log1p(-p) - Math.log(p)) * Math.LOG2E) ** 2;
}

/** The p ≤ 1/2 at which the capacity equals the rate: Shannon's limit on this channel.
 *  @throws ParamError unless 0 ≤ rate ≤ 1. */
export function bscShannonLimit(rate: number): number {
  if (!(rate >= 0 && rate <= 1)) throw new ParamError('rate', rate, 'a rate from 0 to 1');
  if (rate === 1) return 0;
  // On a logarithmic scale, so that limits near 0 keep their digits.
  let low = Math.log(Number.MIN_VALUE);
  let high = Math.log(0.5);
  for (let i = 0; i < 100; i++) {
    const middle = (low + high) / 2;
    if (bscCapacity(Math.exp(middle)) > rate) low = middle;
    else high = middle;
  }
  return Math.exp(high);
}
