import { ParamError } from '../errors.ts';
import { logBinomialTail } from '../statistics/binomial-tail.ts';
import { logBinomialTerm } from '../statistics/binomial-term.ts';
import { logSum } from './log-sum.ts';

/** Least frame error rate of any code of length n with 2^k words on the erasure channel:
 *  Σ_{l > n − k} P(l erasures)·(1 − 2^(n − l − k)) (Polyanskiy, Poor and Verdú 2010, Theorem 38). */
export function becConverse({ n, k, e }: { n: number; k: number; e: number }): number {
  requireChannel(n, k, e);
  return Math.exp(
    logSum(erasures(n, Math.floor(n - k) + 1, (l) => logBinomialTerm(n, l, e) + Math.log1p(-(2 ** (n - l - k))))),
  );
}

/** A frame error rate that some code of length n with 2^k words reaches on the erasure channel: the random-coding union
 *  bound, Σ_l P(l erasures)·min{1, (2^k − 1)·2^−(n − l)} (Polyanskiy, Poor and Verdú 2010, Theorem 16 on this channel). */
export function becRandomCodingUnion({ n, k, e }: { n: number; k: number; e: number }): number {
  requireChannel(n, k, e);
  if (k === 0) return 0;
  const logOthers = k * Math.LN2 + Math.log1p(-(2 ** -k));
  const certain = Math.ceil(n - logOthers / Math.LN2);
  const below = logSum(
    erasures(n, 0, (l) => logBinomialTerm(n, l, e) + Math.min(0, logOthers - (n - l) * Math.LN2), certain - 1),
  );
  return Math.min(1, Math.exp(logSum([below, logBinomialTail(n, e, certain - 1)])));
}

function* erasures(n: number, from: number, term: (l: number) => number, to = n): Generator<number> {
  for (let l = Math.max(0, from); l <= Math.min(n, to); l++) yield term(l);
}

function requireChannel(n: number, k: number, e: number): void {
  if (!Number.isInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of 1 or more');
  if (!(k >= 0 && k <= n)) throw new ParamError('k', k, `a dimension from 0 to n = ${n}`);
  if (!(e > 0 && e < 1)) throw new ParamError('e', e, 'an erasure probability above 0 and below 1');
}
