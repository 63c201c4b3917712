import type { AnalysableCode } from '@/core/codes/analyse-ldpc.ts';
import { type CodeQuestionId, codeQuestions } from '@/core/codes/questions/index.ts';
import { failureOf } from '../failure.ts';
import type { ExamineAnswer } from './api.ts';

/** Answers a question; an engine error comes back as data. */
export function examine(
  question: CodeQuestionId,
  code: AnalysableCode,
  seconds: number,
  onProgress: (share: number) => void,
): ExamineAnswer {
  const from = performance.now();
  try {
    const answer = codeQuestions[question].answer(code, { seconds, onProgress });
    return { ok: true, answer, elapsedMs: performance.now() - from };
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  }
}
