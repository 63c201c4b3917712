import type { Graded } from '../../evidence.ts';
import { automorphismGroup, MAX_AUTOMORPHISM_POINTS } from '../automorphisms.ts';
import { labelledCopies } from '../design-counts.ts';
import type { DesignQuestion } from './question.ts';

export interface AutomorphismAnswer {
  order: Graded<bigint>;
  /** v!/|Aut|: designs on the same named points that are isomorphic to this one. */
  copies: Graded<bigint>;
  /** Points fixed one after another until nothing moves, with the size of each orbit. */
  base: { point: number; orbitSize: number }[];
  generatorCount: number;
}

/** The group of all permutations of the points that keep the set of blocks. */
export const automorphisms: DesignQuestion<AutomorphismAnswer> = {
  obstacle: ({ v }) => (v > MAX_AUTOMORPHISM_POINTS ? `asked of up to ${MAX_AUTOMORPHISM_POINTS} points` : null),
  answer({ design }) {
    const { order, generators, base } = automorphismGroup(design);
    return {
      order: { value: order, grade: 'computed', method: 'a chain of stabilisers, by partition refinement' },
      copies: { value: labelledCopies(design.v, order), grade: 'computed', method: 'v!/|Aut|' },
      base,
      generatorCount: generators.length,
    };
  },
};
