import { absorbingSets } from './absorbing-sets.ts';
import { cycles } from './cycles.ts';
import { distance } from './distance.ts';
import type { CodeQuestion } from './question.ts';
import { stoppingSets } from './stopping-sets.ts';
import { thresholds } from './thresholds.ts';
import { weights } from './weights.ts';

/** What can be asked of a code, in the order shown. */
export const codeQuestions = { distance, weights, cycles, stoppingSets, absorbingSets, thresholds } satisfies Record<
  string,
  CodeQuestion
>;

export type CodeQuestionId = keyof typeof codeQuestions;

export const codeQuestionIds = Object.keys(codeQuestions) as CodeQuestionId[];
