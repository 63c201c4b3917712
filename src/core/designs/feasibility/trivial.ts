import { binomialExact } from '../subset-rank.ts';
import { type FeasibilityRule, nameOf } from './rule.ts';

/** All k-subsets, or repeated copies of them, single blocks that hold every point, and runs of points for t = 1. */
export const trivial: FeasibilityRule = {
  id: 'trivial',
  source: { authors: 'folklore', year: 1847, title: 'The complete design of all k-subsets' },
  grants(query) {
    const { t, v, k, lambda } = query;
    if (query.resolvable && v % k !== 0) return null;
    if (t === 1 && (lambda * v) % k === 0)
      return `The points in order, ${lambda} times round, cut into blocks of ${k}, are a ${nameOf(query)} design.`;
    if (k === v) return `${lambda} copies of the block of all ${v} points.`;
    if (query.resolvable && k !== t) return null;
    const once = binomialExact(v - t, k - t);
    if (BigInt(lambda) % once !== 0n) return null;
    return `All ${k}-subsets of ${v} points${BigInt(lambda) === once ? '' : `, ${BigInt(lambda) / once} times over`}, are a ${nameOf(query)} design.`;
  },
};
