import { ParamError } from '../errors.ts';
import { logBinomialTail } from '../statistics/binomial-tail.ts';
import { logBinomialTerm } from '../statistics/binomial-term.ts';

/** Least frame error rate that any code of length n with 2^k words can have on the binary symmetric channel: the
 *  sphere-packing converse with a shared last shell (Polyanskiy, Poor and Verdú 2010, Theorem 35). A bound: no code does
 *  better, whatever its decoder. k need not be whole. */
export function bscConverse({ n, k, p }: { n: number; k: number; p: number }): number {
  requireChannel(n, k, p);
  const share = -k * Math.LN2;
  // The largest radius whose ball takes no more than a 2^−k share of the space.
  let low = -1;
  let high = n;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (logBall(n, middle) <= share) low = middle;
    else high = middle;
  }
  if (low === n - 1 && logBall(n, n) <= share) return 0;
  const next = low + 1;
  const ball = low < 0 ? 0 : Math.exp(logBall(n, low) - share);
  const lambda = (1 - ball) / Math.exp(logBinomialTerm(n, next, 0.5) - share);
  const beyond = Math.exp(logBinomialTail(n, p, next));
  return beyond + Math.exp(logBinomialTerm(n, next, p)) * Math.max(0, 1 - lambda);
}

/** ln of the share of the space within a radius. */
export const logBall = (n: number, radius: number): number =>
  // The lower tail at one half is the upper tail from the other end.
  logBinomialTail(n, 0.5, n - radius - 1);

export function requireChannel(n: number, k: number, p: number): void {
  if (!Number.isInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of 1 or more');
  if (!(k >= 0 && k <= n)) throw new ParamError('k', k, `a dimension from 0 to n = ${n}`);
  if (!(p > 0 && p < 0.5)) throw new ParamError('p', p, 'a crossover probability above 0 and below 0.5');
}
