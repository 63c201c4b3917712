import { parentPort } from 'node:worker_threads';
import type { ExamineRequest } from './api.ts';
import { examine } from './examine.ts';

// One question a message; shares done and the answer go back with the request's id.
parentPort?.on('message', ({ id, request }: { id: number; request: ExamineRequest }) => {
  const { question, code, seconds } = request;
  const answer = examine(question, code, seconds, (part) => parentPort?.postMessage({ id, part }));
  parentPort?.postMessage({ id, answer });
});
