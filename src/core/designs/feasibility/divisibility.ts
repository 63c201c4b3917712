import { blocksOnPoints, type FeasibilityRule, nameOf } from './rule.ts';

/** Blocks on any i ≤ t points must be a whole number. */
export const divisibility: FeasibilityRule = {
  id: 'divisibility',
  source: {
    authors: 'T. P. Kirkman',
    year: 1847,
    title: 'On a problem in combinations',
    where: 'Cambridge and Dublin Math. J. 2, 191–204',
    part: 'counting blocks on i points, here for any t',
  },
  forbids(query) {
    const { t, v, k, lambda } = query;
    for (let i = t; i >= 0; i--) {
      if (blocksOnPoints(query, i) === null)
        return `A ${nameOf(query)} design would have ${lambda}·C(${v - i},${t - i})/C(${k - i},${t - i}) blocks on ${i} points, which is not a whole number.`;
    }
    return null;
  },
};
