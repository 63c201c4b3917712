import { binomial } from '../../designs/subset-rank.ts';
import type { Citation } from '../../errors.ts';

/** A(n, d, w) where a theorem gives it for every n. */
export interface ExactSize {
  size: number;
  theorem: string;
  source: Citation;
}

const JOHNSON: Citation = {
  authors: 'S. M. Johnson',
  year: 1962,
  title: 'A new upper bound for error-correcting codes',
  where: 'IRE Trans. Inf. Theory 8, 203–207',
};
const SPENCER: Citation = {
  authors: 'J. Spencer',
  year: 1968,
  title: 'Maximal consistent families of triples',
  where: 'J. Combin. Theory 5, 1–8',
};
const HANANI: Citation = {
  authors: 'H. Hanani',
  year: 1960,
  title: 'On quadruple systems',
  where: 'Canad. J. Math. 12, 145–157',
};
const BROUWER_TRIPLES: Citation = {
  authors: 'A. E. Brouwer',
  year: 1978,
  title: 'On the packing of quadruples without common triples',
  where: 'Ars Combin. 5, 3–6',
};
const BAO_JI: Citation = {
  authors: 'J. Bao, L. Ji',
  year: 2015,
  title: 'The completion determination of optimal (3,4)-packings',
  where: 'Des. Codes Cryptogr. 77, 217–229',
};
const BROUWER_PAIRS: Citation = {
  authors: 'A. E. Brouwer',
  year: 1979,
  title: 'Optimal packings of K4’s into a Kn',
  where: 'J. Combin. Theory Ser. A 26, 278–297',
};

/** The most words of length n, weight w and even distance d, when a theorem says it for all n: disjoint words, all words,
 *  and the packings of pairs by triples, triples by quadruples and pairs by quadruples. Null otherwise. */
export function exactSize(n: number, d: number, w: number): ExactSize | null {
  const weight = Math.min(w, n - w);
  if (d <= 2) return { size: binomial(n, weight), theorem: 'all words of the weight', source: JOHNSON };
  if (2 * weight < d) return { size: 1, theorem: 'two words differ in at most 2w places', source: JOHNSON };
  if (2 * weight === d) return { size: Math.floor(n / weight), theorem: 'words are disjoint', source: JOHNSON };
  if (weight === 3 && d === 4)
    return { size: triplePacking(n), theorem: 'packings of pairs by triples', source: SPENCER };
  if (weight === 4 && d === 4) return quadruplePacking(n);
  if (weight === 4 && d === 6)
    return { size: quadruplesOnPairs(n), theorem: 'packings of pairs by quadruples', source: BROUWER_PAIRS };
  return null;
}

/** ⌊n/3 ⌊(n−1)/2⌋⌋, one less when n ≡ 5 (mod 6). */
function triplePacking(n: number): number {
  return Math.floor((n * Math.floor((n - 1) / 2)) / 3) - (n % 6 === 5 ? 1 : 0);
}

/** ⌊n/4 · A(n − 1, 4, 3)⌋ for every n: quadruple systems for n ≡ 2, 4 (mod 6) and their blocks off a point for n ≡ 1, 3,
 *  Brouwer for n ≡ 0, Bao and Ji for the last orders n ≡ 5. */
function quadruplePacking(n: number): ExactSize {
  const size = Math.floor((n * triplePacking(n - 1)) / 4);
  const residue = n % 6;
  if (residue === 2 || residue === 4) return { size, theorem: 'Steiner quadruple systems', source: HANANI };
  if (residue === 1 || residue === 3)
    return { size, theorem: 'Steiner quadruple systems without a point', source: HANANI };
  return { size, theorem: 'packings of triples by quadruples', source: residue === 0 ? BROUWER_TRIPLES : BAO_JI };
}

/** ⌊n/4 ⌊(n−1)/3⌋⌋, one less when n ≡ 7 or 10 (mod 12), and six smaller exceptions. */
function quadruplesOnPairs(n: number): number {
  const exceptions: Record<number, number> = { 8: 2, 9: 3, 10: 5, 11: 6, 17: 20, 19: 25 };
  const general = Math.floor((n * Math.floor((n - 1) / 3)) / 4);
  return exceptions[n] ?? general - (n % 12 === 7 || n % 12 === 10 ? 1 : 0);
}
