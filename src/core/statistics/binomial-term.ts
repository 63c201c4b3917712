import { deviance, halfLogTwoPi, stirlingError } from './saddle-point.ts';

/** ln P(W = w) for W binomial(n, p), 0 < p < 1, by the saddle-point form of C. Loader (2000): no large factorials
 *  cancel, so the absolute error stays near 1e-14 of the logarithm even at n = 10^6. */
export function logBinomialTerm(n: number, w: number, p: number): number {
  if (w < 0 || w > n) return Number.NEGATIVE_INFINITY;
  if (w === 0) return n * Math.log1p(-p);
  if (w === n) return n * Math.log(p);
  const correction = stirlingError(n) - stirlingError(w) - stirlingError(n - w);
  const deviances = deviance(w, n * p) + deviance(n - w, n * (1 - p));
  return correction - deviances - halfLogTwoPi + 0.5 * (Math.log(n) - Math.log(w) - Math.log(n - w));
}
