import type { BuildAnswer, BuildRequest } from '@workers/build/api.ts';
import { createWorkerPool, type PoolLimits } from './worker-pool.ts';

export interface BuildPool {
  /** Builds in a worker thread. @throws Refusal `busy` when too much is waiting. */
  build(request: BuildRequest): Promise<BuildAnswer>;
  close(): Promise<void>;
}

const usualLimits: PoolLimits = { workers: 1, waiting: 20, timeoutMs: 15 * 60_000, heapMb: 2048, idleMs: 60_000 };

export function createBuildPool(limits: Partial<PoolLimits> = {}): BuildPool {
  const pool = createWorkerPool<BuildRequest, BuildAnswer>('build', 'build', { ...usualLimits, ...limits });
  return { build: (request) => pool.run(request), close: () => pool.close() };
}

let shared: BuildPool | undefined;

/** The server's own pool. */
export function buildPool(): BuildPool {
  shared ??= createBuildPool();
  return shared;
}
