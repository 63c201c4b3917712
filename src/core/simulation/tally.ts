import { z } from 'zod';

const count = z.int('a whole number from 0 to 2^53 − 1').min(0);

/** What a set of decoded frames came to; exact integers. Sums of tallies are tallies. */
export const tallySchema = z.strictObject({
  frames: count,
  /** Frames whose decoded word differs from the one sent. */
  frameErrors: count,
  /** Wrong bits over all n positions. */
  bitErrors: count,
  /** Sum over frames of the square of the frame's bit errors, for the variance of the bit error rate. */
  bitErrorsSquared: count,
  /** Failed frames whose syndrome is zero. */
  undetected: count,
  /** Iterations done, summed over frames. */
  iterations: count,
  /** frames × n. */
  bits: count,
  /** Frames by iterations done; entry i counts frames that ended after i. Trailing zeros are dropped. */
  iterationHistogram: z.array(count).max(1025),
});
export type Tally = z.infer<typeof tallySchema>;

export const emptyTally = (): Tally => ({
  frames: 0,
  frameErrors: 0,
  bitErrors: 0,
  bitErrorsSquared: 0,
  undetected: 0,
  iterations: 0,
  bits: 0,
  iterationHistogram: [],
});

/** The tally of both sets of frames; commutative, associative, exact. */
export function mergeTallies(a: Tally, b: Tally): Tally {
  const longest = Math.max(a.iterationHistogram.length, b.iterationHistogram.length);
  return {
    frames: a.frames + b.frames,
    frameErrors: a.frameErrors + b.frameErrors,
    bitErrors: a.bitErrors + b.bitErrors,
    bitErrorsSquared: a.bitErrorsSquared + b.bitErrorsSquared,
    undetected: a.undetected + b.undetected,
    iterations: a.iterations + b.iterations,
    bits: a.bits + b.bits,
    iterationHistogram: Array.from(
      { length: longest },
      (_, i) => (a.iterationHistogram[i] ?? 0) + (b.iterationHistogram[i] ?? 0),
    ),
  };
}

/** Why this tally cannot come from `frames` frames of n bits, as a phrase that names the field; null when it can. */
export function impossibleTally(
  tally: Tally,
  n: number,
  frames: number,
): { field: keyof Tally; accepted: string } | null {
  if (tally.frames !== frames) return { field: 'frames', accepted: `exactly ${frames}, the run's frames per shard` };
  if (tally.bits !== frames * n) return { field: 'bits', accepted: `${frames * n}, frames times n` };
  if (tally.frameErrors > frames) return { field: 'frameErrors', accepted: `at most ${frames}, the number of frames` };
  if (tally.bitErrors < tally.frameErrors || tally.bitErrors > tally.frameErrors * n)
    return {
      field: 'bitErrors',
      accepted: `from ${tally.frameErrors} to ${tally.frameErrors * n}: 1 to n a failed frame`,
    };
  // Cauchy–Schwarz below, n wrong bits a failed frame above.
  const squareFloor = tally.frameErrors === 0 ? 0 : tally.bitErrors ** 2 / tally.frameErrors;
  if (tally.bitErrorsSquared < squareFloor * (1 - 1e-12) || tally.bitErrorsSquared > tally.bitErrors * n)
    return { field: 'bitErrorsSquared', accepted: 'a value that the bit errors allow' };
  if (tally.undetected > tally.frameErrors)
    return { field: 'undetected', accepted: `at most ${tally.frameErrors}, the failed frames` };
  const seen = tally.iterationHistogram.reduce((sum, c) => sum + c, 0);
  if (seen !== frames) return { field: 'iterationHistogram', accepted: `entries that sum to ${frames}` };
  const steps = tally.iterationHistogram.reduce((sum, c, i) => sum + c * i, 0);
  if (steps !== tally.iterations) return { field: 'iterations', accepted: `${steps}, as the histogram says` };
  return null;
}
