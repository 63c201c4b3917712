import { ParamError } from '../errors.ts';
import type { Tally } from './tally.ts';

/** A sequential test of a frame error rate against a limit. */
export interface SequentialTest {
  /** The rate that must be kept. */
  limit: number;
  /** A rate of limit / ratio or less is as good as wanted; between the two either verdict is right. */
  ratio: number;
  /** Most probability of "pass" when the rate is the limit or more. */
  falsePass: number;
  /** Most probability of "fail" when the rate is limit / ratio or less. */
  falseFail: number;
}

/** Natural logarithm of the likelihood of what was seen at `limit`, over that at `limit / ratio`. */
export function logLikelihoodRatio(
  { frames, frameErrors }: Pick<Tally, 'frames' | 'frameErrors'>,
  { limit, ratio }: Pick<SequentialTest, 'limit' | 'ratio'>,
): number {
  return frameErrors * Math.log(ratio) + (frames - frameErrors) * (Math.log1p(-limit) - Math.log1p(-limit / ratio));
}

/** Wald's sequential probability ratio test (Ann. Math. Statist. 16, 1945, section 3). The thresholds are log(1/falseFail)
 *  and log(falsePass), not Wald's closer ones: by his inequality P(ever beyond 1/a) ≤ a (Ville 1939) the stated
 *  probabilities then hold however far the last shard steps over a threshold, wherever the run is looked at or given up.
 *  @throws ParamError on a limit outside (0, 1), a ratio of 1 or less, or probabilities outside (0, 0.5). */
export function sequentialVerdict(
  tally: Pick<Tally, 'frames' | 'frameErrors'>,
  test: SequentialTest,
): 'pass' | 'fail' | null {
  refuse(test);
  const ratio = logLikelihoodRatio(tally, test);
  if (ratio >= -Math.log(test.falseFail)) return 'fail';
  return ratio <= Math.log(test.falsePass) ? 'pass' : null;
}

/** Frames that the test takes on average at a true rate, roughly (Wald's approximation, which neglects the last step);
 *  Infinity near the rate of which the test learns nothing. */
export function expectedFrames(rate: number, test: SequentialTest): number {
  refuse(test);
  const { limit, ratio, falsePass, falseFail } = test;
  const drift = rate * Math.log(ratio) + (1 - rate) * (Math.log1p(-limit) - Math.log1p(-limit / ratio));
  const reached = drift > 0 ? -Math.log(falseFail) : Math.log(falsePass);
  return Math.abs(drift) < 1e-300 ? Number.POSITIVE_INFINITY : Math.ceil(reached / drift);
}

function refuse({ limit, ratio, falsePass, falseFail }: SequentialTest): void {
  if (!(limit > 0 && limit < 1)) throw new ParamError('verdict.limit', limit, 'a rate above 0 and below 1');
  if (!(ratio > 1)) throw new ParamError('verdict.ratio', ratio, 'a factor above 1');
  for (const [name, value] of Object.entries({ falsePass, falseFail })) {
    if (!(value > 0 && value < 0.5)) throw new ParamError(`verdict.${name}`, value, 'a probability from 0 to 0.5');
  }
}
