import type { UploadAnswer, UploadTask } from '@workers/upload/api.ts';
import { createWorkerPool, type PoolLimits, type WorkerPool } from './worker-pool.ts';

export type UploadPool = WorkerPool<UploadTask, UploadAnswer, never>;

const usualLimits: PoolLimits = { workers: 1, waiting: 20, timeoutMs: 10 * 60_000, heapMb: 1024, idleMs: 60_000 };

export const createUploadPool = (limits: Partial<PoolLimits> = {}): UploadPool =>
  createWorkerPool('upload', 'upload', { ...usualLimits, ...limits });

let shared: UploadPool | undefined;

/** The server's own pool. */
export function uploadPool(): UploadPool {
  shared ??= createUploadPool();
  return shared;
}
