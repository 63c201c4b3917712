import { logBinomialTerm } from '../statistics/binomial-term.ts';
import { logBall, requireChannel } from './bsc-converse.ts';
import { logSum } from './log-sum.ts';

/** A frame error rate that some code of length n with 2^k words reaches on the binary symmetric channel: the random-coding
 *  union bound, Σ_t P(t)·min{1, (2^k − 1)·ball(t)} (Polyanskiy, Poor and Verdú 2010, Theorem 33). It says nothing of
 *  codes with a given structure. */
export function bscRandomCodingUnion({ n, k, p }: { n: number; k: number; p: number }): number {
  requireChannel(n, k, p);
  if (k === 0) return 0;
  const logOthers = k * Math.LN2 + Math.log1p(-(2 ** -k));
  return Math.min(1, Math.exp(logSum(terms(n, p, (t) => Math.min(0, logOthers + logBall(n, t))))));
}

/** Terms ln P(t) + price(t), leaving out those below e^−60 of the greatest met on the way up. */
function* terms(n: number, p: number, price: (t: number) => number): Generator<number> {
  let top = Number.NEGATIVE_INFINITY;
  for (let t = 0; t <= n; t++) {
    const mass = logBinomialTerm(n, t, p);
    if (t > n * p && mass < top - 60) return;
    const term = mass + price(t);
    top = Math.max(top, term);
    yield term;
  }
}
