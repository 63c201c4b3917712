import type { RunSpec } from '@/core/simulation/run-spec.ts';
import { runShard } from '@/core/simulation/shard.ts';
import type { ShardAnswer, SimulateApi } from './api.ts';

/** The simulation service of one worker, the same behind comlink and behind worker threads. */
export function createSimulateApi(): SimulateApi {
  const specs = new Map<string, RunSpec>();
  return {
    load(key, spec) {
      specs.set(key, spec);
    },
    async shard(key, index): Promise<ShardAnswer> {
      const spec = specs.get(key);
      if (!spec) return { ok: false, failure: { code: 'unknown-spec', message: `no spec named ${key} was loaded` } };
      const from = performance.now();
      try {
        const tally = await runShard(spec, index);
        return { ok: true, tally, elapsedMs: performance.now() - from };
      } catch (error) {
        if (!(error instanceof Error)) throw error;
        const { code } = error as Error & { code?: string };
        return { ok: false, failure: { code: code ?? 'internal', message: error.message } };
      }
    },
  };
}
