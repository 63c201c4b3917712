import { ENUMERATION_LIMIT } from '../analysis/distance/enumeration-limit.ts';
import type { CodeOutline } from './question.ts';
import type { CodeQuestionId } from './question-ids.ts';

/** What is said of a question before it is asked. */
export interface QuestionCard {
  title: string;
  /** Whether more seconds find more. */
  searches: boolean;
  /** Why it cannot be asked of such a code, with what would be accepted; null when it can. */
  obstacle(outline: CodeOutline): string | null;
}

const hasWords = ({ k }: CodeOutline) => (k === 0 ? 'asked of codes with words besides zero' : null);

/** The questions as they are offered; the answers are apart, since they are much code that a page need not load. */
export const questionCards: Readonly<Record<CodeQuestionId, QuestionCard>> = {
  distance: { title: 'Minimum distance', searches: true, obstacle: hasWords },
  weights: {
    title: 'Weight distribution',
    searches: false,
    obstacle({ n, k }) {
      const smaller = Math.min(k, n - k);
      return smaller <= ENUMERATION_LIMIT
        ? null
        : `asked of codes with k or n − k up to ${ENUMERATION_LIMIT}; here the smaller is ${smaller}`;
    },
  },
  cycles: {
    title: 'Cycles',
    searches: false,
    obstacle: ({ ones }) => (ones > 0 ? null : 'asked of matrices with ones'),
  },
  stoppingSets: { title: 'Smallest stopping sets', searches: true, obstacle: () => null },
  absorbingSets: {
    title: 'Small absorbing sets',
    searches: true,
    obstacle({ columnWeights }) {
      const [least, most] = [columnWeights[0]?.[0] ?? 0, columnWeights.at(-1)?.[0] ?? 0];
      return least >= 3 && most <= 5
        ? null
        : `asked of matrices whose columns have weights 3 to 5; here ${least} to ${most}`;
    },
  },
  thresholds: {
    title: 'Thresholds of its ensemble',
    searches: false,
    obstacle: ({ columnWeights }) => (columnWeights[0]?.[0] ? null : 'asked of matrices without an empty column'),
  },
  encoders: { title: 'Encoders, gates and memory', searches: false, obstacle: hasWords },
};
