import type { Graded } from '../../evidence.ts';
import { countPasches } from '../pasch.ts';
import type { DesignQuestion } from './question.ts';

/** How many sets of four triples cover six points only: the words of weight 4 when bits are triples. */
export const pasches: DesignQuestion<Graded<number>> = {
  obstacle({ k, t, lambda, partialLinear, holds }) {
    if (k !== 3) return 'asked of blocks of three points';
    return holds && (partialLinear || (t === 2 && lambda === 1))
      ? null
      : 'asked of triples of which no two share a pair';
  },
  answer: ({ design }, { onProgress }) => ({
    value: countPasches(design, onProgress),
    grade: 'computed',
    method: 'every pair of triples on a point tried',
  }),
};
