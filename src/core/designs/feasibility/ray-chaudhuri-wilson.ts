import { binomialExact } from '../subset-rank.ts';
import { blocksOnPoints, type FeasibilityRule, nameOf } from './rule.ts';

/** b ≥ C(v, s) for t = 2s and v ≥ k + s. A design of odd strength 2s + 1 is one of strength 2s too. */
export const rayChaudhuriWilson: FeasibilityRule = {
  id: 'ray-chaudhuri-wilson',
  source: {
    authors: 'D. K. Ray-Chaudhuri, R. M. Wilson',
    year: 1975,
    title: 'On t-designs',
    where: 'Osaka J. Math. 12, 737–744',
    part: 'Theorem 1',
  },
  forbids(query) {
    const s = Math.floor(query.t / 2);
    const b = blocksOnPoints(query, 0);
    if (s < 2 || query.v < query.k + s || b === null || b >= binomialExact(query.v, s)) return null;
    return `A ${nameOf(query)} design would have ${b} blocks; strength ${2 * s} needs at least C(${query.v},${s}) = ${binomialExact(query.v, s)}.`;
  },
};
