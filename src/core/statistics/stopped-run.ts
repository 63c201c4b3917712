import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { checkedLevel, lowerLimit, upperLimit } from './binomial-interval.ts';

/** A run that went on until a set number of errors. Its frames are not a fixed number, so that errors over frames is
 *  biased and the fixed-sample interval is not exact. */
export interface StoppedRun {
  /** Errors the run was to stop on. */
  target: number;
  /** Frames and errors at the end of the last shard but one: still below the target. */
  framesBefore: number;
  errorsBefore: number;
  /** Frames and errors at the end of the last shard: at or above the target. */
  frames: number;
  errors: number;
}

export interface StoppedRate extends Enclosure {
  estimate: number;
}

/** The error rate of a run stopped at the first whole shard with `target` errors. At frame T, when error number N came,
 *  (N − 1)/(T − 1) is unbiased (Haldane, Biometrika 33, 1945), its relative spread is nearly the same for all small rates
 *  (Mendo and Hernando, IEEE Trans. Commun. 54, 2006), and the limits that leave T or fewer, or T or more, frames a
 *  probability of (1 − level)/2 are exact. A shard tells T only within bounds: the limits are taken at the bound where
 *  they are wider, and so keep their level; the estimate is taken in the middle.
 *  @throws ParamError when the run did not stop on the target, or on a target below 2. */
export function stoppedRate(run: StoppedRun, level: number): StoppedRate {
  const { target, framesBefore, errorsBefore, frames, errors } = run;
  if (!Number.isInteger(target) || target < 2) throw new ParamError('target', target, 'at least 2 errors');
  if (errorsBefore >= target || errors < target || frames <= framesBefore)
    throw new ParamError('errors', errors, `a run whose last shard brought it from below ${target} errors to it`);
  const tail = (1 - checkedLevel(level)) / 2;
  const earliest = framesBefore + (target - errorsBefore);
  const latest = frames - (errors - target);
  const rate = (at: number) => (target - 1) / (at - 1);
  return {
    estimate: (rate(earliest) + rate(latest)) / 2,
    lower: lowerLimit(target, latest, tail),
    // P(T ≥ t) is the probability of at most N − 1 errors in t − 1 frames.
    upper: earliest === target ? 1 : upperLimit(target - 1, earliest - 1, tail),
  };
}

/** The least number of errors to stop on for which, at small rates, both limits are within that factor of the estimate.
 *  @throws ParamError unless the factor is above 1. */
export function errorsForPrecision(factor: number, level: number): number {
  if (!(factor > 1)) throw new ParamError('factor', factor, 'a factor above 1');
  const tail = (1 - checkedLevel(level)) / 2;
  // Rates so small that only the number of errors matters.
  const frames = 1e12;
  const precise = (target: number) => {
    const estimate = (target - 1) / (frames - 1);
    return (
      upperLimit(target - 1, frames - 1, tail) <= factor * estimate &&
      lowerLimit(target, frames, tail) >= estimate / factor
    );
  };
  let high = 4;
  while (!precise(high)) high *= 2;
  let low = high / 2;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (precise(middle)) high = middle;
    else low = middle;
  }
  return high;
}
