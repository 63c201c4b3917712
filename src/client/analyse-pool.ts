import type { AnalyseApi, AskAnswer, OpenAnswer } from '@workers/analyse/api.ts';
import type { WorkerFailure } from '@workers/failure.ts';
import { proxy } from 'comlink';
import type { DesignSource, OpenedDesign, OpenStep } from '@/core/designs/open-design.ts';
import type { AnswerTo, QuestionId } from '@/core/designs/questions/index.ts';
import { createWorkerPool, type WorkerPool } from './worker-pool.ts';

/** What the engine refused, carried over from the worker with its code and data. */
export class AnalysisRefusal extends Error {
  override readonly name = 'AnalysisRefusal';
  constructor(readonly failure: WorkerFailure) {
    super(failure.message);
  }
}

export interface Timed<T> {
  value: T;
  elapsedMs: number;
}

interface Watch {
  signal?: AbortSignal;
}

/** One design, its worker and what can be asked of it. */
export interface DesignDesk {
  /** @throws AnalysisRefusal as the engine refuses; AbortError when the signal fires. */
  open(source: DesignSource, watch?: Watch & { onStep?(step: OpenStep): void }): Promise<Timed<OpenedDesign>>;
  /** @throws the same. */
  ask<Q extends QuestionId>(
    opened: OpenedDesign,
    question: Q,
    options?: Watch & { seed?: string; limit?: number; onProgress?(share: number): void },
  ): Promise<Timed<AnswerTo<Q>>>;
  close(): void;
}

const spawn = () =>
  new Worker(new URL('../../workers/analyse/browser.ts', import.meta.url), { type: 'module', name: 'analyse' });

/** Builds and questions a design off the page's thread, one question at a time. Cancelling ends the worker; the next
 *  question gives a fresh one the blocks that the page holds. */
export function openDesignDesk(key: string): DesignDesk {
  const pool: WorkerPool<AnalyseApi> = createWorkerPool<AnalyseApi>(spawn, 1);
  return {
    async open(source, { signal, onStep } = {}) {
      const told = proxy((step: OpenStep) => onStep?.(step));
      const answer = await pool.run<OpenAnswer>(async (remote, loaded) => {
        const outcome = await remote.open(key, source, told);
        if (outcome.ok) loaded.add(key);
        return outcome;
      }, signal);
      if (!answer.ok) throw new AnalysisRefusal(answer.failure);
      return { value: answer.opened, elapsedMs: answer.elapsedMs };
    },
    async ask<Q extends QuestionId>(
      opened: OpenedDesign,
      question: Q,
      {
        signal,
        onProgress,
        ...search
      }: Watch & { seed?: string; limit?: number; onProgress?(share: number): void } = {},
    ): Promise<Timed<AnswerTo<Q>>> {
      const told = proxy((share: number) => onProgress?.(share));
      const answer = await pool.run(async (remote, loaded) => {
        if (!loaded.has(key)) {
          await remote.load(key, opened);
          loaded.add(key);
        }
        return (await remote.ask(key, question, search, told)) as AskAnswer<Q>;
      }, signal);
      if (!answer.ok) throw new AnalysisRefusal(answer.failure);
      return { value: answer.answer, elapsedMs: answer.elapsedMs };
    },
    close: () => pool.close(),
  };
}
