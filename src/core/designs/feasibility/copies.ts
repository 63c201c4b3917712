import { knownDesigns } from './known-designs.ts';
import { blocksOnPoints, type DesignQuery, type FeasibilityRule, nameOf } from './rule.ts';
import { spectrumRules } from './spectra.ts';

/** m copies of every block of a t-(v,k,λ/m) design are a t-(v,k,λ) design, resolvable where the one is. */
export const copies: FeasibilityRule = {
  id: 'copies',
  source: { authors: 'folklore', year: 1847, title: 'Blocks may be repeated in a design' },
  grants(query) {
    for (const lambda of properDivisors(query.lambda)) {
      const one = { ...query, lambda };
      if (!isAdmissible(one)) continue;
      const granted = [...spectrumRules, knownDesigns].map((rule) => rule.grants?.(one)).find((words) => words);
      if (granted) return `${query.lambda / lambda} copies of a ${nameOf(one)} design. ${granted}`;
    }
    return null;
  },
};

const isAdmissible = (query: DesignQuery) =>
  Array.from({ length: query.t + 1 }, (_, i) => blocksOnPoints(query, i)).every((blocks) => blocks !== null);

/** Divisors below n, greatest first. */
function properDivisors(n: number): number[] {
  const small: number[] = [];
  for (let d = 1; d * d <= n; d++) if (n % d === 0) small.push(d);
  const large = small.map((d) => n / d).filter((d) => d !== n);
  return [...new Set([...large, ...small.reverse()])].filter((d) => d !== n);
}
