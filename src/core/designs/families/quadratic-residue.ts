import { z } from 'zod';
import { isPrime, primesUpTo, squaresModulo } from '../../algebra/integers.ts';
import { ParamError } from '../../errors.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { developCyclically } from '../develop.ts';
import { defineFamily } from '../family.ts';
import { exactly } from '../partial-linear-prediction.ts';

const MAX_PRIME = 4000;
const ACCEPTED = `a prime ≡ 3 (mod 4) from 7 to ${MAX_PRIME}`;

/** Translates of the non-zero squares modulo p: a symmetric 2-(p, (p−1)/2, (p−3)/4) design.
 *  @throws ParamError unless p is a prime ≡ 3 (mod 4), p ≥ 7. */
export const quadraticResidue = defineFamily({
  id: 'quadratic-residue',
  title: 'Quadratic-residue design',
  params: [{ name: 'q', label: 'prime q', kind: 'integer', accepted: ACCEPTED, example: 23 }],
  source: {
    authors: 'R. E. A. C. Paley',
    year: 1933,
    title: 'On orthogonal matrices',
    where: 'J. Math. Phys. 12, 311–320',
  },
  schema: z.strictObject({ q: z.number().int().min(7).max(MAX_PRIME) }),
  require({ q }) {
    if (q % 4 !== 3 || !isPrime(q)) throw new ParamError('q', q, ACCEPTED);
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primesUpTo(Math.min(maxPoints, maxBlocks, MAX_PRIME))) if (q % 4 === 3 && q >= 7) yield { q };
  },
  predict({ q }) {
    const counts = { v: q, b: q, k: (q - 1) / 2, r: (q - 1) / 2, lambda: (q - 3) / 4 };
    const rank = q % 8 === 7 ? rankOfResidueCode(q) : undefined;
    return { t: 2, ...counts, cyclic: true, codes: predictTwoDesignCodes(counts, { rank, structure: 'cyclic' }) };
  },
  build: ({ q }) => developCyclically(q, [squaresModulo(q).filter((x) => x !== 0)]),
});

/** When 2 is a square modulo p, Σ x^r over the squares r is an idempotent of GF(2)[x]/(x^p − 1), and its (p − 1)/2 terms are
 *  odd in number: it is 1 at half of the p-th roots of unity other than 1, and at 1, and 0 elsewhere. */
const rankOfResidueCode = (p: number) =>
  exactly((p + 1) / 2, 'proved', 'the squares are an idempotent, as 2 is one of them', {
    authors: 'F. J. MacWilliams, N. J. A. Sloane',
    year: 1977,
    title: 'The Theory of Error-Correcting Codes',
    where: 'North-Holland',
    part: 'Chapter 16, section 3',
  });
