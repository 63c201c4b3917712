import { logBinomialTerm } from './binomial-term.ts';

/** P(W > t) for W binomial(n, p), as a natural logarithm, so that it is good down to any depth. Sums the larger side of
 *  the ratio series from its greatest term on; relative error of the sum about 1e-13. Returns −Infinity when t ≥ n. */
export function logBinomialTail(n: number, p: number, t: number): number {
  if (t >= n) return Number.NEGATIVE_INFINITY;
  if (t < 0) return 0;
  const odds = p / (1 - p);
  const mean = n * p;
  // Above the mean the tail itself is summed; below it the other side, whose complement is then not small.
  if (t + 1 > mean) return logBinomialTerm(n, t + 1, p) + Math.log(risingSum(n, t + 1, odds));
  const below = Math.exp(logBinomialTerm(n, t, p)) * fallingSum(n, t, odds);
  return Math.log1p(-Math.min(1, below));
}

/** Σ_{w ≥ from} term(w)/term(from). */
function risingSum(n: number, from: number, odds: number): number {
  let sum = 1;
  let term = 1;
  for (let w = from; w < n; w++) {
    term *= ((n - w) / (w + 1)) * odds;
    sum += term;
    if (term < sum * 1e-17) break;
  }
  return sum;
}

/** Σ_{w ≤ from} term(w)/term(from). */
function fallingSum(n: number, from: number, odds: number): number {
  let sum = 1;
  let term = 1;
  for (let w = from; w > 0; w--) {
    term *= w / ((n - w + 1) * odds);
    sum += term;
    if (term < sum * 1e-17) break;
  }
  return sum;
}
