import { gcd, isPrime } from '../../algebra/integers.ts';
import { seededRandom } from '../../algebra/seeded-random.ts';
import { cyclicBaseTriples } from '../triple-systems/peltesohn.ts';
import { differenceSet } from './difference-sets.ts';
import { searchFamily } from './search.ts';
import { wilsonFamily } from './wilson.ts';

/** Nodes of the backtracking search, and tries of Wilson's random block: three seconds or so at most. */
export const FAMILY_SEARCH_NODES = 60_000_000;
const WILSON_TRIES = 200_000;

/** Base blocks of a cyclic 2-(v,k,λ) design, by the first method that gives one:
 *  k = 3: Peltesohn 1939; one base block: known difference sets; v prime: Wilson 1972; v a product of such:
 *  Colbourn and Colbourn 1980; else a seeded search. Null when the budgets are spent, which proves nothing. */
export function findDifferenceFamily(v: number, k: number, lambda: number): number[][] | null {
  if (k === 3 && lambda === 1) return v === 9 ? null : cyclicBaseTriples(v);
  const set = lambda * (v - 1) === k * (k - 1) ? differenceSet(v, k, lambda) : null;
  if (set) return [set];
  const random = seededRandom(`difference family ${v} ${k} ${lambda}`);
  if (lambda === 1) {
    const algebraic = (isPrime(v) ? wilsonFamily(v, k, random, WILSON_TRIES) : null) ?? productFamily(v, k);
    if (algebraic) return algebraic;
  }
  const short = lambda === 1 && v % (k * (k - 1)) === k ? [Array.from({ length: k }, (_, i) => (i * v) / k)] : [];
  return searchFamily(v, k, lambda, short, random, FAMILY_SEARCH_NODES);
}

/** From (u,k,1) and (w,k,1) families, w prime to (k − 1)!, one for v = uw: every block {b₀, …, b_{k−1}} of the first
 *  gives the w blocks {bᵢ + i·s·u}, and the second is taken u-fold. Here both are families without short orbits.
 *  Source: M. J. Colbourn and C. J. Colbourn, Ars Combin. 10 (1980) 153–177 (in the form of Jimbo and Kuriki 1983). */
function productFamily(v: number, k: number): number[][] | null {
  const factorial = Array.from({ length: k - 1 }, (_, i) => i + 1).reduce((a, b) => a * b, 1);
  for (let u = k * (k - 1) + 1; u * u <= v * v && u < v; u += k * (k - 1)) {
    const w = v / u;
    if (!Number.isInteger(w) || w % (k * (k - 1)) !== 1 || gcd(w, factorial) !== 1) continue;
    const outer = findDifferenceFamily(u, k, 1);
    const inner = outer && findDifferenceFamily(w, k, 1);
    if (!outer || !inner) continue;
    const lifted = outer.flatMap((block) =>
      Array.from({ length: w }, (_, s) => block.map((x, i) => (x + i * s * u) % v)),
    );
    return [...lifted, ...inner.map((block) => block.map((x) => x * u))];
  }
  return null;
}
