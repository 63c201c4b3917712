import type { DesignSpec } from '../block-design.ts';
import { families } from '../families/index.ts';
import type { DesignQuery } from './rule.ts';

/** Strength up to which an extension is looked for, to be derived from. */
const MAX_STRENGTH = 5;

/** Copies of a design that are put together, one inside the other. */
const MAX_COPIES = 4;

/** A spec that can be built here and has these parameters; null when there is none: a family whose closed formulas give
 *  them, the blocks on a point of a design of one strength more, or copies of a design of a smaller λ. */
export function constructionFor(query: DesignQuery): DesignSpec | null {
  return fromFamily(query) ?? fromExtension(query) ?? fromCopies(query);
}

/** The first family that gives the parameters. Each is walked in increasing size only as far as v. */
function fromFamily(query: DesignQuery): DesignSpec | null {
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

function fromExtension({ t, v, k, lambda, resolvable }: DesignQuery): DesignSpec | null {
  if (resolvable || t < 2 || t >= MAX_STRENGTH) return null;
  const larger = { t: t + 1, v: v + 1, k: k + 1, lambda };
  const of = fromFamily(larger) ?? fromExtension(larger);
  return of && { family: 'derived', params: { of } };
}

function fromCopies(query: DesignQuery): DesignSpec | null {
  if (query.resolvable) return null;
  for (let copies = 2; copies <= MAX_COPIES; copies++) {
    if (query.lambda % copies !== 0) continue;
    const one = fromFamily({ ...query, lambda: query.lambda / copies });
    if (!one) continue;
    let all = one;
    for (let i = 1; i < copies; i++) all = { family: 'union', params: { first: all, second: one } };
    return all;
  }
  return null;
}

/** A design of strength T is one of every lower strength t, with λ·C(v−t, T−t)/C(k−t, T−t). */
function lambdaAt({ t: T, v, k, lambda }: { t: number; v: number; k: number; lambda: number }, t: number): number {
  let value = lambda;
  for (let i = T - 1; i >= t; i--) value = (value * (v - i)) / (k - i);
  return value;
}
