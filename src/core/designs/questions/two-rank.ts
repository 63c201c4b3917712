import type { Enclosure, Graded } from '../../evidence.ts';
import { rank } from '../../gf2/rank.ts';
import { incidenceMatrix } from '../open-design.ts';
import type { DesignQuestion } from './question.ts';

export interface TwoRankAnswer {
  rank: Graded<number>;
  /** What the family's formulas say of it. */
  formula?: Graded<Enclosure>;
}

/** Rank of the incidence matrix over GF(2). */
export const twoRank: DesignQuestion<TwoRankAnswer> = {
  obstacle: () => null,
  answer: ({ design, predictedRank }) => ({
    rank: {
      value: rank(incidenceMatrix(design)),
      grade: 'computed',
      method: 'elimination over GF(2), or one gcd if cyclic',
    },
    ...(predictedRank && { formula: predictedRank }),
  }),
};
