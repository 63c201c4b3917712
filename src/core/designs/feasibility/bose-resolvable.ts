import { blocksOnPoints, type FeasibilityRule, nameOf } from './rule.ts';

/** A resolvable 2-design has k dividing v and b ≥ v + r − 1. */
export const boseResolvable: FeasibilityRule = {
  id: 'bose-resolvable',
  source: {
    authors: 'R. C. Bose',
    year: 1942,
    title: 'A note on the resolvability of balanced incomplete block designs',
    where: 'Sankhyā 6, 105–110',
  },
  forbids(query) {
    if (!query.resolvable) return null;
    const { v, k } = query;
    if (v % k !== 0)
      return `A parallel class of blocks of size ${k} cannot partition ${v} points: ${k} does not divide ${v}.`;
    const b = blocksOnPoints(query, 0);
    const r = blocksOnPoints(query, 1);
    if (query.t < 2 || b === null || r === null || b >= BigInt(v) + r - 1n) return null;
    return `A resolvable ${nameOf(query)} design needs b ≥ v + r − 1 = ${BigInt(v) + r - 1n} blocks and would have ${b}.`;
  },
};
