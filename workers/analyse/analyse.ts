import { type OpenedDesign, openDesign } from '@/core/designs/open-design.ts';
import { type AnswerTo, designQuestions, type QuestionId } from '@/core/designs/questions/index.ts';
import { failureOf } from '../failure.ts';
import type { AnalyseApi, AskAnswer, OpenAnswer } from './api.ts';

/** The analysis service of one worker; engine errors come back as data. */
export function createAnalyseApi(): AnalyseApi {
  let held: { key: string; opened: OpenedDesign } | null = null;
  const clock = () => performance.now();
  return {
    async open(key, source, onStep): Promise<OpenAnswer> {
      const from = clock();
      try {
        const opened = openDesign(source, { clock, onStep });
        held = { key, opened };
        return { ok: true, opened, elapsedMs: clock() - from };
      } catch (error) {
        return { ok: false, failure: failureOf(error) };
      }
    },
    load(key, opened) {
      held = { key, opened };
    },
    async ask<Q extends QuestionId>(
      key: string,
      question: Q,
      search: { seed?: string; limit?: number },
      onProgress: (share: number) => void,
    ): Promise<AskAnswer<Q>> {
      if (held?.key !== key) {
        return { ok: false, failure: { code: 'unknown-design', message: `no design ${key} is open`, data: {} } };
      }
      const from = clock();
      try {
        const answer = designQuestions[question].answer(held.opened, { ...search, onProgress }) as AnswerTo<Q>;
        return { ok: true, answer, elapsedMs: clock() - from };
      } catch (error) {
        return { ok: false, failure: failureOf(error) };
      }
    },
  };
}
