import { expose } from 'comlink';
import { codeQuestions } from '@/core/codes/questions/index.ts';
import { failureOf } from '../failure.ts';
import type { ExamineApi } from './api.ts';

const api: ExamineApi = {
  async ask(question, code, seconds, onProgress) {
    const from = performance.now();
    try {
      const answer = codeQuestions[question].answer(code, { seconds, onProgress });
      return { ok: true, answer, elapsedMs: performance.now() - from };
    } catch (error) {
      return { ok: false, failure: failureOf(error) };
    }
  },
};
expose(api);
