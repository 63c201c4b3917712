import { analyseLdpc } from '../analyse-ldpc.ts';
import { enclosureLine } from '../properties.ts';
import type { CodeQuestion } from './question.ts';

/** Operations on words of 32 bits that a usual machine does in a second. */
const OPERATIONS_A_SECOND = 2e8;

/** The minimum distance, between what is proved and the lightest word found. */
export const distance: CodeQuestion = {
  title: 'Minimum distance',
  searches: true,
  obstacle: ({ k }) => (k === 0 ? 'asked of codes with words besides zero' : null),
  answer(code, { seconds }) {
    const effort = { wordOperations: seconds * OPERATIONS_A_SECOND };
    const found = analyseLdpc(code, { cycles: false, distance: effort }).distance;
    return { lines: [enclosureLine('distance', 'Minimum distance', found)] };
  },
};
