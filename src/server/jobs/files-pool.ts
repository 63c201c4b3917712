import type { FilesAnswer, FilesRequest } from '@workers/files/api.ts';
import { createWorkerPool, type PoolLimits, type WorkerPool } from './worker-pool.ts';

export type FilesPool = WorkerPool<FilesRequest, FilesAnswer, Uint8Array>;

const usualLimits: PoolLimits = { workers: 1, waiting: 20, timeoutMs: 10 * 60_000, heapMb: 2048, idleMs: 60_000 };

export const createFilesPool = (limits: Partial<PoolLimits> = {}): FilesPool =>
  createWorkerPool('files', 'file', { ...usualLimits, ...limits });

let shared: FilesPool | undefined;

/** The server's own pool. */
export function filesPool(): FilesPool {
  shared ??= createFilesPool();
  return shared;
}
