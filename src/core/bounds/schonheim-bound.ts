import { ParamError } from '../errors.ts';

/** Lower bound on the number of k-subsets of v points that cover every t-subset, ⌈v/k ⌈(v−1)/(k−1) ⌈…⌉⌉⌉ (Schönheim 1964).
 *  @throws ParamError unless 1 ≤ t ≤ k ≤ v are whole. */
export function schonheimBound(v: number, k: number, t: number): number {
  if (!Number.isSafeInteger(v) || v < 1) throw new ParamError('v', v, 'a whole number of 1 or more');
  if (!Number.isSafeInteger(k) || k < 1 || k > v) throw new ParamError('k', k, `a whole number from 1 to v = ${v}`);
  if (!Number.isSafeInteger(t) || t < 1 || t > k) throw new ParamError('t', t, `a whole number from 1 to k = ${k}`);
  let bound = 1;
  for (let i = t - 1; i >= 0; i--) bound = Math.ceil(((v - i) * bound) / (k - i));
  return bound;
}
