import type { Tally } from '@/core/simulation/tally.ts';

/** A shard's tally without what its run says already (frames, bits): frame errors, bit errors, their squares,
 *  undetected, iterations, then the iteration histogram. */
export type PackedTally = [number, number, number, number, number, number[]];

export interface StoredResults {
  /** Fingerprints of the matrices decoded, by the scenario's key. */
  fingerprints: Record<string, string>;
  /** By run key: for each point of the scenario, its shards 0, 1, 2, … */
  runs: Record<string, PackedTally[][]>;
}

export const packTally = (tally: Tally): PackedTally => [
  tally.frameErrors,
  tally.bitErrors,
  tally.bitErrorsSquared,
  tally.undetected,
  tally.iterations,
  tally.iterationHistogram,
];

export function unpackTally(packed: PackedTally, frames: number, n: number): Tally {
  const [frameErrors, bitErrors, bitErrorsSquared, undetected, iterations, iterationHistogram] = packed;
  const counts = { frameErrors, bitErrors, bitErrorsSquared, undetected, iterations, iterationHistogram };
  return { frames, bits: frames * n, ...counts };
}
