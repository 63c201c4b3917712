import { bruckRyserChowla } from './bruck-ryser-chowla.ts';
import { knownExceptions } from './known-exceptions.ts';
import { type DesignQuery, type FeasibilityRule, nameOf } from './rule.ts';

/** A design with r = k + λ and λ ≤ 2 is the residual of a symmetric 2-(v + r, r, λ) design, and falls with it. */
export const residualEmbedding: FeasibilityRule = {
  id: 'residual-embedding',
  source: {
    authors: 'M. Hall, W. S. Connor',
    year: 1954,
    title: 'An embedding theorem for balanced incomplete block designs',
    where: 'Canad. J. Math. 6, 35–41',
    part: 'λ = 2; for λ = 1 an affine plane completes to a projective one',
  },
  forbids(query) {
    const whole = completion(query);
    const why = whole && (bruckRyserChowla.forbids?.(whole) ?? knownExceptions.forbids?.(whole));
    return why
      ? `A ${nameOf(query)} design would be the residual of a symmetric ${nameOf(whole)} design. ${why}`
      : null;
  },
};

function completion({ t, v, k, lambda }: DesignQuery): DesignQuery | null {
  const r = (lambda * (v - 1)) / (k - 1);
  return t === 2 && lambda <= 2 && r === k + lambda ? { t: 2, v: v + r, k: r, lambda } : null;
}
