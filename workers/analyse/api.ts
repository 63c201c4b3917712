import type { DesignSource, OpenedDesign, OpenStep } from '@/core/designs/open-design.ts';
import type { AnswerTo, QuestionId } from '@/core/designs/questions/index.ts';
import type { WorkerFailure } from '../failure.ts';

export type OpenAnswer = { ok: true; opened: OpenedDesign; elapsedMs: number } | { ok: false; failure: WorkerFailure };

export type AskAnswer<Q extends QuestionId = QuestionId> =
  | { ok: true; answer: AnswerTo<Q>; elapsedMs: number }
  | { ok: false; failure: WorkerFailure };

/** A worker keeps the design it has last opened or been given, so that its blocks cross the border once. */
export interface AnalyseApi {
  open(key: string, source: DesignSource, onStep: (step: OpenStep) => void): Promise<OpenAnswer>;
  /** Gives a fresh worker a design that another one opened. */
  load(key: string, opened: OpenedDesign): void;
  ask<Q extends QuestionId>(
    key: string,
    question: Q,
    search: { seed?: string; limit?: number },
    onProgress: (share: number) => void,
  ): Promise<AskAnswer<Q>>;
}
