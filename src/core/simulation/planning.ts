import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { binomialInterval } from '../statistics/binomial-interval.ts';
import type { StoppingRule } from './stopping.ts';
import type { Tally } from './tally.ts';

export interface FramesLeft extends Enclosure {
  expected: number;
}

/** Frames a point still needs under its rule, by the rate seen so far; the limits by those of the rate at 90 %. With no
 *  error yet only the rule's own end is known. */
export function framesLeft(tally: Pick<Tally, 'frames' | 'frameErrors'>, rule: StoppingRule): FramesLeft {
  const { frames, frameErrors } = tally;
  const room = Math.max(0, rule.maxFrames - frames);
  const wanted = Math.max(0, rule.frameErrors - frameErrors);
  if (wanted === 0 || room === 0) return { expected: 0, lower: 0, upper: 0 };
  if (frames === 0) return { expected: room, lower: wanted, upper: room };
  const { lower, upper } = binomialInterval(frameErrors, frames, 0.9);
  const at = (rate: number) => (rate > 0 ? Math.min(room, Math.ceil(wanted / rate)) : room);
  return { expected: at(frameErrors / frames), lower: at(upper), upper: at(lower) };
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
  const wanted = fer > 0 ? Math.min(rule.maxFrames, rule.frameErrors / fer) : rule.maxFrames;
  return Math.ceil(wanted / framesPerShard) * framesPerShard;
}
