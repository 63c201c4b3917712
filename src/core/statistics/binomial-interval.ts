import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { lowerQuantile, upperQuantile } from './beta-quantile.ts';

/** Two-sided interval of Clopper and Pearson (Biometrika 26, 1934) for the probability behind x successes in n
 *  independent trials: each side is missed with probability at most (1 − level)/2, whatever the probability is. At x = 0
 *  the lower limit is 0 and the upper is still the two-sided one, 1 − ((1 − level)/2)^(1/n); the tighter one-sided limit
 *  is `zeroErrorUpperLimit`. Relative error below 10^-12 up to n = 10^15.
 *  @throws ParamError unless 0 ≤ x ≤ n are whole numbers, n ≥ 1, and 0 < level < 1. */
export function binomialInterval(x: number, n: number, level: number): Enclosure {
  checkCounts(x, n);
  const tail = (1 - checkedLevel(level)) / 2;
  return { lower: lowerLimit(x, n, tail), upper: upperLimit(x, n, tail) };
}

/** Upper limit on a probability after n trials without a success: the p at which that would have happened with
 *  probability 1 − level, one-sided. About 3/n at 95 %. */
export function zeroErrorUpperLimit(n: number, level: number): number {
  checkCounts(0, n);
  return -Math.expm1(Math.log1p(-checkedLevel(level)) / n);
}

/** The least p that leaves x or more successes a probability of `tail`, at most 1/2. */
export function lowerLimit(x: number, n: number, tail: number): number {
  if (x === 0) return 0;
  return x === n ? tail ** (1 / n) : lowerQuantile(tail, x, n - x + 1);
}

/** The largest p that leaves x or fewer successes a probability of `tail`, at most 1/2. */
export function upperLimit(x: number, n: number, tail: number): number {
  if (x === n) return 1;
  return x === 0 ? -Math.expm1(Math.log(tail) / n) : upperQuantile(tail, x + 1, n - x);
}

export function checkedLevel(level: number): number {
  if (!(level > 0 && level < 1)) throw new ParamError('level', level, 'a confidence level above 0 and below 1');
  return level;
}

function checkCounts(x: number, n: number): void {
  if (!Number.isSafeInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of trials from 1');
  if (!Number.isSafeInteger(x) || x < 0 || x > n) throw new ParamError('x', x, `a whole number from 0 to ${n}`);
}
