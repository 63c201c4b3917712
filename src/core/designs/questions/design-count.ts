import { type AsymptoticCount, asymptoticSteinerCount } from '../design-counts.ts';
import { type DesignQuestion, outlineOf } from './question.ts';

/** About how many designs have these parameters: the leading term of a theorem on v → ∞, never a count. */
export const designCount: DesignQuestion<AsymptoticCount> = {
  obstacle: ({ t, lambda, k, v, holds, partialLinear }) =>
    holds && t >= 2 && lambda === 1 && !partialLinear && k !== null && k < v
      ? null
      : 'known for Steiner systems, λ = 1',
  answer(opened) {
    const { t, k, v } = outlineOf(opened);
    return asymptoticSteinerCount({ t, k: k!, v });
  },
};
