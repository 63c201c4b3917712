import type { FilesRequest } from '@workers/files/api.ts';
import type { FilesPool } from './files-pool.ts';
import { refusalOfFailure } from './worker-refusal.ts';

/** The bytes of a file as a worker makes them. Resolves with the first part, so that a request that cannot be met is
 *  refused before anything is sent; a reader that goes away ends the worker.
 *  @throws Refusal as the engine's error says. */
export function workerStream(
  pool: FilesPool,
  request: FilesRequest,
  signal: AbortSignal,
): Promise<ReadableStream<Uint8Array>> {
  const gone = new AbortController();
  return new Promise((resolve, reject) => {
    let begun = false;
    const stream = new ReadableStream<Uint8Array>({
      start(controller) {
        const onPart = (part: Uint8Array) => {
          if (!begun) resolve(stream);
          begun = true;
          controller.enqueue(part);
        };
        const fail = (error: unknown) => {
          reject(error);
          if (begun && !gone.signal.aborted) controller.error(error);
        };
        pool.run(request, { onPart, signal: AbortSignal.any([signal, gone.signal]) }).then((answer) => {
          if (!answer.ok) return fail(refusalOfFailure(answer.failure));
          if (!begun) resolve(stream);
          controller.close();
        }, fail);
      },
      cancel: () => gone.abort(),
    });
  });
}
