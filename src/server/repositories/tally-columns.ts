import type { Tally } from '@/core/simulation/tally.ts';

/** A tally as the columns that points and shards share. */
export const tallyToColumns = (tally: Tally) => ({
  frames: tally.frames,
  frame_errors: tally.frameErrors,
  bit_errors: tally.bitErrors,
  bit_errors_squared: tally.bitErrorsSquared,
  undetected: tally.undetected,
  iterations: tally.iterations,
  bits: tally.bits,
  iteration_histogram: JSON.stringify(tally.iterationHistogram),
});

export type TallyColumns = ReturnType<typeof tallyToColumns>;

export const tallyFromColumns = (row: TallyColumns): Tally => ({
  frames: row.frames,
  frameErrors: row.frame_errors,
  bitErrors: row.bit_errors,
  bitErrorsSquared: row.bit_errors_squared,
  undetected: row.undetected,
  iterations: row.iterations,
  bits: row.bits,
  iterationHistogram: JSON.parse(row.iteration_histogram),
});
