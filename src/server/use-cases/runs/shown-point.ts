import type { Point } from '@/api/runs.ts';
import { berInterval } from '@/core/statistics/ber-interval.ts';
import { binomialInterval, zeroErrorUpperLimit } from '@/core/statistics/binomial-interval.ts';
import { stoppedRate } from '@/core/statistics/stopped-run.ts';
import type { StoredPoint } from '../../repositories/points.ts';

/** Confidence of every interval given out. */
const level = 0.95;

/** A point as the interface shows it: rates and intervals from its tally. Without frames nothing is known, and the
 *  intervals say so: 0 to 1. */
export function shownPoint(point: StoredPoint, extra: number[]): Point {
  const { id, runId, codeId, n, k, channel, decoder, tally, nextIndex, done, stopReason } = point;
  return {
    ...{ id, runId, codeId, n, k, channel, decoder, tally, nextIndex, extra, done, level },
    stopReason,
    recomputed: point.recomputed,
    setAside: point.setAside,
    plan: point.plan,
    stopped: stoppedOf(point),
    codeLabel: `(${n},${k}) ${point.designTitle}`,
    fer: tally.frames > 0 ? tally.frameErrors / tally.frames : 0,
    ber: tally.bits > 0 ? tally.bitErrors / tally.bits : 0,
    ...intervalsOf(point),
  };
}

function intervalsOf({ tally, n }: StoredPoint): Pick<Point, 'interval' | 'berInterval'> {
  const { frames, frameErrors } = tally;
  if (frames === 0) return { interval: { lower: 0, upper: 1 }, berInterval: { lower: 0, upper: 1 } };
  if (frameErrors === 0) {
    // No failure seen: the one-sided limit; the bit error rate is nowhere above the frame error rate.
    const limit = { lower: 0, upper: zeroErrorUpperLimit(frames, level) };
    return { interval: limit, berInterval: limit };
  }
  return { interval: binomialInterval(frameErrors, frames, level), berInterval: berInterval(tally, n, level) };
}

/** Where a point stopped on a number of errors, frames are not a fixed number, and the estimate that suits differs. */
function stoppedOf({ stopTarget: target, tally, before }: StoredPoint): Point['stopped'] {
  if (target === null || target < 2) return null;
  const { frames: framesBefore, frameErrors: errorsBefore } = before;
  return stoppedRate({ target, framesBefore, errorsBefore, frames: tally.frames, errors: tally.frameErrors }, level);
}
