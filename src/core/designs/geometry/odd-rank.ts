import type { Citation } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { exactly } from '../partial-linear-prediction.ts';

const MORTIMER: Citation = {
  authors: 'B. Mortimer',
  year: 1980,
  title: 'The modular permutation representations of the known doubly transitive groups',
  where: 'Proc. London Math. Soc. (3) 41, 1–20',
};

/** Rank over GF(2) of blocks whose set is invariant under a group with irreducible heart: the only invariant codes are
 *  zero, the repetition code, the words of even weight, and everything. Blocks that are neither empty nor everything
 *  span the last or the last but one: v − 1 for even blocks, v for odd ones.
 *  The heart is irreducible over GF(2) for PSL(m+1,q) with m ≥ 2 and q odd on the points of PG(m,q), for PGL(2,q) with q
 *  odd and for PSL(2,q) with q ≡ ±3 (mod 8) on the projective line, and for AGL(m,q) with q odd on AG(m,q). */
export function rankWithIrreducibleHeart(v: number, k: number, group: string): Graded<Enclosure> {
  return exactly(k % 2 === 0 ? v - 1 : v, 'proved', `irreducible heart of ${group} modulo 2 (Mortimer 1980)`, MORTIMER);
}
