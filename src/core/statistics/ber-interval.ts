import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { binomialInterval, checkedLevel } from './binomial-interval.ts';
import { gaussianQuantile, studentQuantile } from './student.ts';

export interface FrameSums {
  frames: number;
  frameErrors: number;
  /** Σ of the frames' bit errors, and Σ of their squares. */
  bitErrors: number;
  bitErrorsSquared: number;
}

/** From so many failed frames on, the mean over frames is taken as Gaussian. */
const manyFailures = 100;

/** Interval for the bit error rate. Bits of a frame fail together, so that the unit is the frame: with many failed
 *  frames the mean of the bit errors a frame, by its variance over frames. With few, the frame error rate (exact, half
 *  of the error allowance) times the mean of the bit errors a failed frame (Student, the other half, kept within 1 to
 *  n). The Gaussian and Student parts are approximations, not guarantees.
 *  @throws ParamError without frames, or on a level outside 0 … 1. */
export function berInterval(sums: FrameSums, n: number, level: number): Enclosure {
  const { frames, frameErrors, bitErrors, bitErrorsSquared } = sums;
  checkedLevel(level);
  if (!Number.isInteger(frames) || frames < 1) throw new ParamError('frames', frames, 'at least one frame');
  if (frameErrors >= manyFailures) {
    const mean = bitErrors / frames;
    const variance = Math.max(0, bitErrorsSquared - mean * bitErrors) / Math.max(1, frames - 1);
    const reach = gaussianQuantile(level) * Math.sqrt(variance / frames);
    return { lower: Math.max(0, mean - reach) / n, upper: Math.min(n, mean + reach) / n };
  }
  const half = (1 + level) / 2;
  const fer = binomialInterval(frameErrors, frames, half);
  const bits = failedFrameBits(sums, n, half);
  return { lower: (fer.lower * bits.lower) / n, upper: (fer.upper * bits.upper) / n };
}

/** Interval for the mean number of wrong bits in a failed frame. */
function failedFrameBits({ frameErrors, bitErrors, bitErrorsSquared }: FrameSums, n: number, level: number): Enclosure {
  if (frameErrors < 2) return { lower: 1, upper: n };
  const mean = bitErrors / frameErrors;
  const variance = Math.max(0, bitErrorsSquared - mean * bitErrors) / (frameErrors - 1);
  const reach = studentQuantile(level, frameErrors - 1) * Math.sqrt(variance / frameErrors);
  return { lower: Math.max(1, mean - reach), upper: Math.min(n, mean + reach) };
}
