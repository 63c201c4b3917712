import type { Measurement } from '@/api/measurements.ts';
import { binomialInterval, zeroErrorUpperLimit } from '@/core/statistics/binomial-interval.ts';
import type { StoredMeasurement } from '../../repositories/measurements.ts';

/** Confidence of every interval given out. */
const level = 0.95;

/** Measured data as the interface shows them: each point with the interval that its counts allow. */
export const shownMeasurement = (stored: StoredMeasurement): Measurement => ({
  ...stored,
  level,
  points: stored.points.map((point) => ({ ...point, interval: intervalOf(point.frameErrors, point.frames) })),
});

const intervalOf = (frameErrors: number, frames: number) =>
  frameErrors === 0
    ? { lower: 0, upper: zeroErrorUpperLimit(frames, level) }
    : binomialInterval(frameErrors, frames, level);
