import { galoisField } from '../../algebra/galois-field.ts';
import { primePowerOf } from '../../algebra/integers.ts';
import { powerOfX, primitivePolynomial } from '../../algebra/primitive-polynomial.ts';
import { ParamError } from '../../errors.ts';

/** Flat `index` of the Desarguesian spread of PG(m,q), as flat + 1 vectors over GF(q): x^index times the powers of a
 *  generator of GF(q^(flat+1)) inside GF(q^(m+1)). Nothing else is built, so the spread may have billions of flats.
 *  Limits: q^(m+1) below 2^53. Source: Segre 1964. */
export function spreadBasis(geometry: { m: number; q: number; flat: number }, index: number): Uint32Array[] {
  const { m, q, flat } = geometry;
  if (!primePowerOf(q)) throw new ParamError('q', q, 'a prime power');
  if (!Number.isInteger(m) || !Number.isSafeInteger(q ** (m + 1))) throw new ParamError('m', m, 'q^(m+1) below 2^53');
  if (!Number.isInteger(flat) || flat < 0 || (m + 1) % (flat + 1) !== 0) {
    throw new ParamError('flat', flat, `one less than a divisor of ${m + 1}`);
  }
  const count = (q ** (m + 1) - 1) / (q ** (flat + 1) - 1);
  if (!Number.isInteger(index) || index < 0 || index >= count) {
    throw new ParamError('index', index, `an integer from 0 to ${count - 1}`);
  }
  const field = galoisField(q);
  const modulus = primitivePolynomial(field, m + 1);
  // x^count generates the subfield's multiplicative group, and its powers 0 … flat are a basis over GF(q).
  return Array.from({ length: flat + 1 }, (_, j) => powerOfX(field, modulus, index + j * count));
}
