import { blocksOnPoints, type FeasibilityRule, nameOf } from './rule.ts';

/** b ≥ v when t ≥ 2 and k < v: the incidence matrix has rank v over the rationals. */
export const fisher: FeasibilityRule = {
  id: 'fisher',
  source: {
    authors: 'R. A. Fisher',
    year: 1940,
    title: 'An examination of the different possible solutions of a problem in incomplete blocks',
    where: 'Ann. Eugenics 10, 52–75',
  },
  forbids(query) {
    const b = blocksOnPoints(query, 0);
    if (query.t < 2 || query.k >= query.v || b === null || b >= BigInt(query.v)) return null;
    return `A ${nameOf(query)} design would have ${b} blocks on ${query.v} points; it needs at least as many blocks as points.`;
  },
};
