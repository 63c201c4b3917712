import type { DesignSpec } from '../block-design.ts';
import { families } from '../families/index.ts';
import type { DesignQuery } from './rule.ts';

/** The first family whose closed formulas give these parameters, as a spec that can be built here; null when none does.
 *  Each family is walked in increasing size only as far as v. */
export function constructionFor(query: DesignQuery): DesignSpec | null {
  const { t, v, k, lambda } = query;
  for (const family of families) {
    for (const params of family.enumerate({ maxPoints: v, maxBlocks: 20_000_000 })) {
      const p = family.predict(params);
      const strongEnough = !p.partialLinear && (p.t === t ? p.lambda === lambda : p.t > t && lambdaAt(p, t) === lambda);
      if (p.v === v && p.k === k && strongEnough && (!query.resolvable || p.resolvable))
        return { family: family.id, params: params as DesignSpec['params'] };
    }
  }
  return null;
}

/** A design of strength T is one of every lower strength t, with λ·C(v−t, T−t)/C(k−t, T−t). */
function lambdaAt({ t: T, v, k, lambda }: { t: number; v: number; k: number; lambda: number }, t: number): number {
  let value = lambda;
  for (let i = T - 1; i >= t; i--) value = (value * (v - i)) / (k - i);
  return value;
}
