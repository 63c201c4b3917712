import type { ShardAnswer, SimulateApi } from '@workers/simulate/api.ts';
import type { Remote } from 'comlink';
import type { Code } from '@/api/codes.ts';
import type { Point, Run } from '@/api/runs.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { matrixOf } from './code-matrix.ts';
import { createWorkerPool, defaultPoolSize } from './worker-pool.ts';

export interface SimulationPool {
  readonly size: number;
  shard(point: Point, index: number, signal: AbortSignal): Promise<ShardAnswer>;
  close(): void;
}

/** Computes a run's shards in workers; a point's matrix goes to each worker once. Points use the run's seed as it
 *  is, so that two decoders at the same channel point meet the same error patterns; a planned stage adds its own. */
export function createSimulationPool(
  run: Run,
  codes: ReadonlyMap<string, Pick<Code, 'id' | 'fingerprint'>>,
): SimulationPool {
  const pool = createWorkerPool<SimulateApi>(
    () =>
      new Worker(new URL('../../workers/simulate/browser.ts', import.meta.url), { type: 'module', name: 'simulate' }),
    defaultPoolSize(),
  );
  const load = (remote: Remote<SimulateApi>, point: Point, H: SparseMatrix) => {
    const { framesPerShard } = run;
    const { channel, decoder, k, n, plan, codeId } = point;
    const seed = plan ? `${run.seed} ${plan.stream}` : run.seed;
    const branchesPerShard = plan?.enumerate?.branchesPerShard;
    const options = { matrixKey: codeId, ...(branchesPerShard !== undefined && { branchesPerShard }) };
    return remote.load(point.id, { H, channel, decoder, framesPerShard, seed, rate: k / n }, options);
  };
  return {
    size: pool.size,
    close: () => pool.close(),
    async shard(point, index, signal) {
      const code = codes.get(point.codeId);
      if (!code) return { ok: false, failure: { code: 'no-code', message: `The code ${point.codeLabel} is gone.` } };
      const H = await matrixOf(code);
      return pool.run(async (remote, loaded) => {
        if (!loaded.has(point.id)) {
          await load(remote, point, H);
          loaded.add(point.id);
        }
        const answer = await remote.shard(point.id, index);
        if (answer.ok || answer.failure.code !== 'unknown-spec') return answer;
        // It has made room for others since.
        await load(remote, point, H);
        return remote.shard(point.id, index);
      }, signal);
    },
  };
}
