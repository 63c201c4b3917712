import { binomial, primePowerOf } from '../../algebra/integers.ts';
import type { Citation } from '../../errors.ts';

export const HAMADA: Citation = {
  authors: 'N. Hamada',
  year: 1973,
  title:
    'On the p-rank of the incidence matrix of a balanced or partially balanced incomplete block design and its applications to error correcting codes',
  where: 'Hiroshima Math. J. 3, 153–226',
  part: 'Theorem 1',
};

/** Rank of the points against the d-flats of PG(m,q) over GF(p), where q is a power of p.
 *  Hamada's sum over sequences (s_0, …, s_h = s_0) is the trace of a power of the matrix of its factors. d = m is the
 *  whole space, of rank 1. */
export function hamadaRank(m: number, q: number, d: number): number {
  const { p, m: h } = primePowerOf(q)!;
  const range = Array.from({ length: m - d + 1 }, (_, i) => d + 1 + i);
  const factors = range.map((s) => range.map((next) => monomials(m, p, next * p - s)));
  let power = factors;
  for (let i = 1; i < h; i++) power = product(power, factors);
  return power.reduce((trace, row, i) => trace + row[i]!, 0);
}

/** Monomials of the degree in m + 1 variables, each of degree below p. */
function monomials(m: number, p: number, degree: number): number {
  let count = 0;
  for (let i = 0; i * p <= degree; i++) {
    count += (i % 2 === 0 ? 1 : -1) * binomial(m + 1, i) * binomial(m + degree - i * p, m);
  }
  return count;
}

function product(A: readonly number[][], B: readonly number[][]): number[][] {
  return A.map((row) => B[0]!.map((_, j) => row.reduce((sum, a, i) => sum + a * B[i]![j]!, 0)));
}
