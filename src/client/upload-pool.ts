import type { LookAnswer, UploadApi } from '@workers/upload/api.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';
import { createWorkerPool, type WorkerPool } from './worker-pool.ts';

let pool: WorkerPool<UploadApi> | undefined;
const spawn = () =>
  new Worker(new URL('../../workers/upload/browser.ts', import.meta.url), { type: 'module', name: 'upload' });

/** Reads a chosen file off the page's thread, where it lies: what it holds, or where it is wrong.
 *  @throws AbortError within a frame of the signal firing. */
export function lookAtFile(file: File, format: UploadFormat | undefined, signal: AbortSignal): Promise<LookAnswer> {
  pool ??= createWorkerPool<UploadApi>(spawn, 1);
  return pool.run<LookAnswer>(async (remote) => await remote.look(file, format), signal);
}
