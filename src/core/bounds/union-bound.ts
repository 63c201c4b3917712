import { logBinomialTail } from '../statistics/binomial-tail.ts';
import { logBinomialTerm } from '../statistics/binomial-term.ts';
import { logSum } from './log-sum.ts';

/** Upper bound on the frame error rate of maximum-likelihood decoding on the binary symmetric channel from a code's weight
 *  distribution: Σ A_w·P(a given word of weight w is at least as likely), ties counted half. Useless above 1; given only
 *  the low weights it is an estimate, not a bound. */
export function unionBound(weights: Iterable<readonly [weight: number, count: number | bigint]>, p: number): number {
  const logs: number[] = [];
  for (const [w, count] of weights) {
    if (w === 0 || Number(count) === 0) continue;
    const beyond = logBinomialTail(w, p, Math.floor(w / 2));
    const tie = w % 2 === 0 ? logBinomialTerm(w, w / 2, p) - Math.LN2 : Number.NEGATIVE_INFINITY;
    logs.push(logOf(count) + logSum([beyond, tie]));
  }
  return Math.exp(logSum(logs));
}

/** Probability that an error pattern is a codeword other than zero: Σ A_w·p^w·(1 − p)^(n − w). */
export function undetectedErrorRate(
  weights: Iterable<readonly [weight: number, count: number | bigint]>,
  n: number,
  p: number,
): number {
  const logs: number[] = [];
  for (const [w, count] of weights) {
    if (w > 0) logs.push(logOf(count) + w * Math.log(p) + (n - w) * Math.log1p(-p));
  }
  return Math.exp(logSum(logs));
}

/** ln of a count that may pass what a double holds. */
function logOf(count: number | bigint): number {
  if (typeof count === 'number') return Math.log(count);
  const digits = count.toString();
  return digits.length < 300
    ? Math.log(Number(count))
    : Math.log(Number(digits.slice(0, 17))) + (digits.length - 17) * Math.LN10;
}
