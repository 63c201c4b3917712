import type { DesignQuery } from './rule.ts';

/** Designs that this one would contain, each as parameters and the words for it. The blocks on a point, without it, are a
 *  derived design; the complements of the blocks are a design as well. */
export function consequencesOf(query: DesignQuery): { query: DesignQuery; words: string }[] {
  const { t, v, k, lambda } = query;
  const found: { query: DesignQuery; words: string }[] = [];
  if (t >= 3) found.push({ query: { t: t - 1, v: v - 1, k: k - 1, lambda }, words: 'its derived design at a point' });
  if (t === 2 && 2 * k > v && k < v - 1) {
    // Blocks that miss two given points: b − 2r + λ.
    const r = (lambda * (v - 1)) / (k - 1);
    const missing = (v * r) / k - 2 * r + lambda;
    if (missing > 0)
      found.push({ query: { t: 2, v, k: v - k, lambda: missing }, words: 'the design of its complements' });
  }
  return found;
}
