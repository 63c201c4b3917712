import { automorphisms } from './automorphisms.ts';
import { designCount } from './design-count.ts';
import { intersections } from './intersections.ts';
import { pasches } from './pasches.ts';
import type { DesignQuestion } from './question.ts';
import { resolution } from './resolution.ts';
import { twoRank } from './two-rank.ts';

/** What can be asked of a built design, in the order shown. */
export const designQuestions = { intersections, resolution, twoRank, pasches, automorphisms, designCount };

export type QuestionId = keyof typeof designQuestions;

export type AnswerTo<Q extends QuestionId> = (typeof designQuestions)[Q] extends DesignQuestion<infer A> ? A : never;

export const questionIds = Object.keys(designQuestions) as QuestionId[];
