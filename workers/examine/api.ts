import type { AnalysableCode } from '@/core/codes/analyse-ldpc.ts';
import type { CodeAnswer } from '@/core/codes/questions/question.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import type { WorkerFailure } from '../failure.ts';

export type ExamineAnswer = { ok: true; answer: CodeAnswer; elapsedMs: number } | { ok: false; failure: WorkerFailure };

export interface ExamineRequest {
  question: CodeQuestionId;
  code: AnalysableCode;
  seconds: number;
}

export interface ExamineApi {
  ask(
    question: CodeQuestionId,
    code: AnalysableCode,
    seconds: number,
    onProgress: (share: number) => void,
  ): Promise<ExamineAnswer>;
}
