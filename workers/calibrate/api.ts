import type { Calibration } from '@/core/simulation/calibrate.ts';
import type { RunSpec } from '@/core/simulation/run-spec.ts';
import type { KernelDescription } from '@/core/simulation/shard.ts';
import type { WorkerFailure } from '../failure.ts';

export type CalibrateAnswer<T> = { ok: true; value: T } | { ok: false; failure: WorkerFailure };

/** What is found out of a decoder before a run. */
export interface CalibrateApi {
  calibrate(spec: RunSpec, onTrial: (done: number, all: number) => void): Promise<CalibrateAnswer<Calibration>>;
  /** Which path the shards of a spec take in this engine, and why. */
  describe(spec: RunSpec): Promise<CalibrateAnswer<KernelDescription>>;
}
