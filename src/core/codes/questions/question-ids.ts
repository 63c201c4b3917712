/** What can be asked of a code, in the order shown; apart from the answers, which are much code. */
export const codeQuestionIds = [
  'distance',
  'weights',
  'cycles',
  'stoppingSets',
  'absorbingSets',
  'thresholds',
  'encoders',
] as const;

export type CodeQuestionId = (typeof codeQuestionIds)[number];
