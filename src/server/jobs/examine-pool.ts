import type { ExamineAnswer, ExamineRequest } from '@workers/examine/api.ts';
import { createWorkerPool, type PoolLimits, type WorkerPool } from './worker-pool.ts';

export type ExaminePool = WorkerPool<ExamineRequest, ExamineAnswer, number>;

const usualLimits: PoolLimits = { workers: 1, waiting: 20, timeoutMs: 60 * 60_000, heapMb: 2048, idleMs: 60_000 };

export const createExaminePool = (limits: Partial<PoolLimits> = {}): ExaminePool =>
  createWorkerPool('examine', 'analysis', { ...usualLimits, ...limits });

let shared: ExaminePool | undefined;

/** The server's own pool. */
export function examinePool(): ExaminePool {
  shared ??= createExaminePool();
  return shared;
}
