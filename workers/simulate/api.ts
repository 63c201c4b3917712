import type { RunSpec } from '@/core/simulation/run-spec.ts';
import type { Tally } from '@/core/simulation/tally.ts';

export type ShardAnswer =
  | { ok: true; tally: Tally; elapsedMs: number }
  | { ok: false; failure: { code: string; message: string } };

/** A worker keeps the specs it has been given, so that the matrix crosses the border once a point. */
export interface SimulateApi {
  /** Names a spec for later shards; naming it again replaces it. */
  load(key: string, spec: RunSpec): void;
  shard(key: string, index: number): Promise<ShardAnswer>;
}
