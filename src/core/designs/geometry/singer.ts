import { galoisField } from '../../algebra/galois-field.ts';
import { primitivePolynomial, shiftByX } from '../../algebra/primitive-polynomial.ts';

/** Exponents i < (q^(m+1)−1)/(q−1) whose power x^i of a primitive element lies in a fixed hyperplane of PG(m,q).
 *  For m = 2 a perfect difference set of q + 1 residues modulo q² + q + 1.
 *  Source: Singer, Trans. Amer. Math. Soc. 43 (1938) 377–385. */
export function singerDifferenceSet(q: number, m: number): number[] {
  return exponentsWithTopCoefficient(q, m + 1, (q ** (m + 1) - 1) / (q - 1), 0);
}

/** Exponents i < q^m − 1 whose power x^i lies on a fixed hyperplane of AG(m,q) that misses the origin.
 *  Source: Bose, J. Indian Math. Soc. 6 (1942) 1–15, the affine analogue of Singer's theorem, for m = 2. */
export function boseDifferenceSet(q: number, m: number): number[] {
  return exponentsWithTopCoefficient(q, m, q ** m - 1, 1);
}

function exponentsWithTopCoefficient(q: number, degree: number, count: number, wanted: 0 | 1): number[] {
  const field = galoisField(q);
  const modulus = primitivePolynomial(field, degree);
  const element = new Uint32Array(degree);
  element[0] = 1;
  const exponents: number[] = [];
  for (let i = 0; i < count; i++) {
    if (element[degree - 1] === wanted) exponents.push(i);
    shiftByX(field, modulus, element);
  }
  return exponents;
}
