import type { BuildAnswer, BuildApi, BuildFailure, BuildRequest, BuiltCode } from '@workers/build/api.ts';
import { proxy } from 'comlink';
import type { SheetStep } from '@/core/codes/sheet.ts';
import { createWorkerPool, type WorkerPool } from './worker-pool.ts';

/** What the engine refused, carried over from the worker with its code and data. */
export class BuildRefusal extends Error {
  override readonly name = 'BuildRefusal';
  constructor(readonly failure: BuildFailure) {
    super(failure.message);
  }
}

let pool: WorkerPool<BuildApi> | undefined;
const spawn = () =>
  new Worker(new URL('../../workers/build/browser.ts', import.meta.url), { type: 'module', name: 'build' });

/** Builds a design, proves it and derives its code, or goes on from a stored matrix, off the page's thread.
 *  @throws BuildRefusal when the engine refuses; AbortError within a frame of the signal firing. */
export async function buildCodeInWorker(
  request: BuildRequest,
  options: { signal?: AbortSignal; onProgress?: (step: SheetStep) => void } = {},
): Promise<BuiltCode> {
  pool ??= createWorkerPool<BuildApi>(spawn, 1);
  const onStep = proxy((step: SheetStep) => options.onProgress?.(step));
  const answer = await pool.run<BuildAnswer>(async (remote) => await remote.build(request, onStep), options.signal);
  if (!answer.ok) throw new BuildRefusal(answer.failure);
  return answer.built;
}
