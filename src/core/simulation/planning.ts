import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { binomialInterval } from '../statistics/binomial-interval.ts';
import { expectedFrames, logLikelihoodRatio, type SequentialTest } from './sequential-test.ts';
import { errorTarget, type StoppingRule, stoppingReason } from './stopping.ts';
import type { Tally } from './tally.ts';

export interface FramesLeft extends Enclosure {
  expected: number;
}

/** Frames a point still needs under its rule, by the rate seen so far; the limits by those of the rate at 90 %. With no
 *  error yet only the rule's own end is known. */
export function framesLeft(tally: Pick<Tally, 'frames' | 'frameErrors'>, rule: StoppingRule): FramesLeft {
  const { frames, frameErrors } = tally;
  const room = Math.max(0, rule.maxFrames - frames);
  if (room === 0 || stoppingReason(tally, rule)) return { expected: 0, lower: 0, upper: 0 };
  if (rule.verdict && frames > 0) return verdictFramesLeft(tally, rule.verdict, room);
  const target = errorTarget(rule);
  if (target === null) return { expected: room, lower: rule.verdict ? 1 : room, upper: room };
  const wanted = target - frameErrors;
  if (frames === 0) return { expected: room, lower: wanted, upper: room };
  const { lower, upper } = binomialInterval(frameErrors, frames, 0.9);
  const at = (rate: number) => (rate > 0 ? Math.min(room, Math.ceil(wanted / rate)) : room);
  return { expected: at(frameErrors / frames), lower: at(upper), upper: at(lower) };
}

/** What is left of a sequential test, if the rest goes on as it has: the way to the threshold it is heading for. */
function verdictFramesLeft(
  { frames, frameErrors }: Pick<Tally, 'frames' | 'frameErrors'>,
  test: SequentialTest,
  room: number,
): FramesLeft {
  const soFar = logLikelihoodRatio({ frames, frameErrors }, test);
  const at = (rate: number) => {
    const drift = logLikelihoodRatio({ frames: 1, frameErrors: rate }, test);
    const threshold = drift > 0 ? -Math.log(test.falseFail) : Math.log(test.falsePass);
    return drift === 0 ? room : Math.min(room, Math.max(1, Math.ceil((threshold - soFar) / drift)));
  };
  const { lower, upper } = binomialInterval(frameErrors, frames, 0.9);
  const expected = at(frameErrors / frames);
  const ends = [at(lower), at(upper), expected];
  // Between a rate that fails and one that passes lies one at which the test takes longest.
  const sides =
    logLikelihoodRatio({ frames: 1, frameErrors: lower }, test) < 0 &&
    logLikelihoodRatio({ frames: 1, frameErrors: upper }, test) > 0;
  return { expected, lower: Math.min(...ends), upper: sides ? room : Math.max(...ends) };
}

export interface MeasuredPoint {
  p: number;
  fer: number;
}

/** A guess of the failure rate at p from two measured points or more: straight between neighbours, and beyond the ends,
 *  in log p and log FER. For planning only; a curve can bend, and a floor lies beneath many.
 *  @throws ParamError without two points of different p with failures. */
export function guessRate(points: readonly MeasuredPoint[], p: number): number {
  const usable = points.filter(({ fer }) => fer > 0).sort((a, b) => a.p - b.p);
  const distinct = usable.filter((point, i) => i === 0 || point.p !== usable[i - 1]!.p);
  if (distinct.length < 2) throw new ParamError('points', distinct.length, 'two points of different p with failures');
  const after = distinct.findIndex((point) => point.p >= p);
  const right = after < 0 ? distinct.length - 1 : Math.max(1, after);
  const [a, b] = [distinct[right - 1]!, distinct[right]!];
  const slope = Math.log(b.fer / a.fer) / Math.log(b.p / a.p);
  return Math.min(1, a.fer * (p / a.p) ** slope);
}

/** Frames, in whole shards, to meet a rule at a rate. */
export function framesToPlan(fer: number, rule: StoppingRule, framesPerShard: number): number {
  const target = errorTarget(rule);
  const byErrors = target !== null && fer > 0 ? target / fer : rule.maxFrames;
  const byVerdict = rule.verdict ? expectedFrames(fer, rule.verdict) : rule.maxFrames;
  const wanted = Math.min(rule.maxFrames, byErrors, byVerdict);
  return Math.ceil(wanted / framesPerShard) * framesPerShard;
}
