import { absorbingSets } from './absorbing-sets.ts';
import { cycles } from './cycles.ts';
import { distance } from './distance.ts';
import { encoders } from './encoders.ts';
import type { CodeQuestion } from './question.ts';
import type { CodeQuestionId } from './question-ids.ts';
import { stoppingSets } from './stopping-sets.ts';
import { thresholds } from './thresholds.ts';
import { weights } from './weights.ts';

export { type CodeQuestionId, codeQuestionIds } from './question-ids.ts';

/** The questions by id. */
export const codeQuestions = {
  distance,
  weights,
  cycles,
  stoppingSets,
  absorbingSets,
  thresholds,
  encoders,
} satisfies Record<CodeQuestionId, CodeQuestion>;
