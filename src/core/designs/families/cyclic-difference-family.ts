import { z } from 'zod';
import { isPrime, primePowersUpTo, primesUpTo } from '../../algebra/integers.ts';
import { type Citation, InfeasibleError, LimitError } from '../../errors.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { developCyclically } from '../develop.ts';
import { isDifferenceFamily } from '../difference-families/difference-table.ts';
import { FAMILY_SEARCH_NODES, findDifferenceFamily } from '../difference-families/find.ts';
import { defineFamily } from '../family.ts';
import { rankOfTripleSystem } from '../triple-systems/prediction.ts';

const MAX_POINTS = 5000;
const MAX_INCIDENCES = 2e7;

const schema = z.strictObject({
  v: z.number().int().min(7).max(MAX_POINTS),
  k: z.number().int().min(3).max(2500),
  lambda: z.number().int().min(1).max(2500),
});
type Params = z.infer<typeof schema>;

const BOSE: Citation = {
  authors: 'R. C. Bose',
  year: 1939,
  title: 'On the construction of balanced incomplete block designs',
  where: 'Ann. Eugenics 9, 353–399',
};

/** Composite orders where the search, or the product with a smaller family (169, 481), is known to reach one within
 *  its budget, by block size. */
const SEARCHED: Record<number, readonly number[]> = {
  4: [40, 49, 52, 64, 76, 85, 88, 100, 112, 121, 124, 133, 136, 145, 148, 169, 481],
  5: [65, 81, 85],
};

/** Cyclic 2-(v,k,λ) designs from base blocks whose differences cover 1..v−1 λ times each. Every family is checked by
 *  its difference table before it leaves. Whether one exists is open for many parameters; a search that ends without
 *  one proves nothing and throws LimitError. */
export const cyclicDifferenceFamily = defineFamily({
  id: 'cyclic-difference-family',
  title: 'Cyclic design from a difference family',
  params: [
    { name: 'v', label: 'points v', kind: 'integer', accepted: `an integer from 7 to ${MAX_POINTS}`, example: 37 },
    { name: 'k', label: 'block size k', kind: 'integer', accepted: 'an integer from 3, less than v', example: 4 },
    { name: 'lambda', label: 'blocks on a pair λ', kind: 'integer', accepted: 'an integer from 1', example: 1 },
  ],
  source: BOSE,
  schema,
  require: requireDifferenceArithmetic,
  enumerate: enumerateFamilies,
  predict({ v, k, lambda }) {
    const counts = { v, b: (lambda * v * (v - 1)) / (k * (k - 1)), k, r: (lambda * (v - 1)) / (k - 1), lambda };
    const rank = k === 3 && lambda === 1 && v > 7 ? rankOfTripleSystem(v) : undefined;
    return { t: 2, ...counts, cyclic: true, codes: predictTwoDesignCodes(counts, { rank, cyclic: true }) };
  },
  build({ v, k, lambda }) {
    const b = (lambda * v * (v - 1)) / (k * (k - 1));
    if (b * k > MAX_INCIDENCES)
      throw new LimitError('incidences of a cyclic design', b * k, MAX_INCIDENCES, 'incidences');
    const base = findDifferenceFamily(v, k, lambda);
    if (!base) {
      const what = `search for a (${v},${k},${lambda}) difference family, none found so far,`;
      throw new LimitError(what, FAMILY_SEARCH_NODES + 1, FAMILY_SEARCH_NODES, 'search nodes');
    }
    if (!isDifferenceFamily(v, lambda, base))
      throw new Error(`differences of (${v},${k},${lambda}) are not covered evenly`);
    return developCyclically(v, base);
  },
});

/** Full orbits alone give λ(v−1) ≡ 0 (mod k(k−1)); with λ = 1 one short orbit gives v ≡ k (mod k(k−1)). */
function requireDifferenceArithmetic({ v, k, lambda }: Params): void {
  const pairs = k * (k - 1);
  const full = (lambda * (v - 1)) % pairs === 0;
  const withShort = lambda === 1 && v % pairs === k;
  if (k < v - 1 && lambda < k && (full || withShort) && !(v === 9 && k === 3 && lambda === 1)) return;
  const accepted = lambda === 1 ? `; for k = ${k}, λ = 1 that is v ≡ 1 or ${k} (mod ${pairs})` : '';
  throw new InfeasibleError(
    'divisibility',
    v === 9 && k === 3
      ? 'No cyclic triple system has 9 points (Peltesohn 1939).'
      : `Base blocks of size ${k} cover differences ${pairs} at a time, so λ(v − 1) = ${lambda * (v - 1)} must be a ` +
          `multiple of ${pairs}, or one short orbit left over, with λ < k < v − 1${accepted}.`,
    BOSE,
    'v',
  );
}

function* enumerateFamilies({ maxPoints, maxBlocks }: { maxPoints: number; maxBlocks: number }): Generator<Params> {
  const top = Math.min(maxPoints, MAX_POINTS);
  for (const params of knownDifferenceSets(top)) if (params.v <= maxBlocks) yield params;
  for (let v = 13; v <= Math.min(top, 3000) && (v * (v - 1)) / 6 <= maxBlocks; v++) {
    if (v % 6 === 1 || v % 6 === 3) yield { v, k: 3, lambda: 1 };
  }
  for (const k of [4, 5]) {
    const pairs = k * (k - 1);
    for (let v = pairs + 2; v <= Math.min(top, 1000) && (v * (v - 1)) / pairs <= maxBlocks; v++) {
      if ((v % pairs === 1 && isPrime(v)) || SEARCHED[k]!.includes(v)) yield { v, k, lambda: 1 };
    }
  }
}

/** Planar Singer sets, twin primes and fourth powers; squares are the family quadratic-residue. */
function* knownDifferenceSets(maxPoints: number): Generator<Params> {
  for (const q of primePowersUpTo(Math.sqrt(maxPoints))) {
    const v = q * q + q + 1;
    if (v <= maxPoints && q <= 64) yield { v, k: q + 1, lambda: 1 };
  }
  const primes = primesUpTo(Math.sqrt(maxPoints));
  for (const p of primes) {
    const v = p * (p + 2);
    if (isPrime(p + 2) && v <= maxPoints) yield { v, k: (v - 1) / 2, lambda: (v - 3) / 4 };
  }
  for (const v of [37, 101, 197, 677]) if (v <= maxPoints) yield { v, k: (v - 1) / 4, lambda: (v - 5) / 16 };
}
