import { parentPort } from 'node:worker_threads';
import type { BuildRequest } from './api.ts';
import { buildCode } from './build-code.ts';

// One request a message; steps and the answer go back with the request's id.
parentPort?.on('message', async ({ id, request }: { id: number; request: BuildRequest }) => {
  const answer = await buildCode(request, (step) => parentPort?.postMessage({ id, step }));
  parentPort?.postMessage({ id, answer });
});
