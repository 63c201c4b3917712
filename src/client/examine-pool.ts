import type { ExamineAnswer, ExamineApi } from '@workers/examine/api.ts';
import { proxy } from 'comlink';
import type { AnalysableCode } from '@/core/codes/analyse-ldpc.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import { createWorkerPool, type WorkerPool } from './worker-pool.ts';

let pool: WorkerPool<ExamineApi> | undefined;
const spawn = () =>
  new Worker(new URL('../../workers/examine/browser.ts', import.meta.url), { type: 'module', name: 'examine' });

/** Asks something of a code off the page's thread. Cancelling ends the worker at once.
 *  @throws AbortError within a frame of the signal firing. */
export function examineCode(
  question: CodeQuestionId,
  code: AnalysableCode,
  options: { seconds: number; signal: AbortSignal; onProgress(share: number): void },
): Promise<ExamineAnswer> {
  pool ??= createWorkerPool<ExamineApi>(spawn, 1);
  const told = proxy(options.onProgress);
  return pool.run<ExamineAnswer>(
    async (remote) => await remote.ask(question, code, options.seconds, told),
    options.signal,
  );
}
