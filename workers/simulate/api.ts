import type { RunSpec } from '@/core/simulation/run-spec.ts';
import type { Tally } from '@/core/simulation/tally.ts';

export type ShardAnswer =
  | { ok: true; tally: Tally; elapsedMs: number }
  | { ok: false; failure: { code: string; message: string } };

export interface SpecOptions {
  /** Names the matrix: specs of one name share what was loaded first, and the kernels made for it. */
  matrixKey?: string;
  /** All patterns of the spec's stratum instead of random ones, so many branches a shard. */
  branchesPerShard?: number;
}

/** A worker keeps the specs it has been given last, so that the matrix crosses the border once a point. */
export interface SimulateApi {
  /** Names a spec for later shards; naming it again replaces it. */
  load(key: string, spec: RunSpec, options?: SpecOptions): void;
  /** Answers with the failure `unknown-spec` when the spec was never loaded or had to make room since. */
  shard(key: string, index: number): Promise<ShardAnswer>;
}

/** A shard for a worker that may not have seen its spec yet. */
export interface ShardTask {
  key: string;
  spec: RunSpec;
  options: SpecOptions;
  index: number;
}
