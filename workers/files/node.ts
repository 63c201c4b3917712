import { parentPort } from 'node:worker_threads';
import type { FilesRequest } from './api.ts';
import { makeFiles } from './make-files.ts';

// One request a message; parts and the answer go back with the request's id.
parentPort?.on('message', async ({ id, request }: { id: number; request: FilesRequest }) => {
  const answer = await makeFiles(request, (part) => parentPort?.postMessage({ id, part }));
  parentPort?.postMessage({ id, answer });
});
