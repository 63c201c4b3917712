import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  addPolynomials,
  degreeOf,
  dividePolynomials,
  equalPolynomials,
  exponentsOf,
  gcdPolynomials,
  multiplyPolynomials,
  polynomialOf,
  remainderOf,
  xToTheNMinusOne,
} from '../../../src/core/algebra/gf2-polynomial.ts';
import { ParamError } from '../../../src/core/errors.ts';
import { bigintOf, plainGcd, plainProduct, plainRemainder } from '../../models/gf2-polynomial.ts';

const polynomial = fc.uniqueArray(fc.nat(200), { maxLength: 60 }).map(polynomialOf);
const nonZero = polynomial.filter((a) => degreeOf(a) >= 0);

describe('polynomials over GF(2)', () => {
  test('product, remainder and gcd agree with their plain twins', () => {
    fc.assert(
      fc.property(polynomial, nonZero, (a, b) => {
        expect(bigintOf(multiplyPolynomials(a, b))).toBe(plainProduct(bigintOf(a), bigintOf(b)));
        expect(bigintOf(remainderOf(a, b))).toBe(plainRemainder(bigintOf(a), bigintOf(b)));
        expect(bigintOf(gcdPolynomials(a, b))).toBe(plainGcd(bigintOf(a), bigintOf(b)));
      }),
    );
  });

  test('dividend = quotient · divisor + remainder', () => {
    fc.assert(
      fc.property(polynomial, nonZero, (a, b) => {
        const { quotient, remainder } = dividePolynomials(a, b);
        expect(degreeOf(remainder)).toBeLessThan(degreeOf(b));
        expect(equalPolynomials(addPolynomials(multiplyPolynomials(quotient, b), remainder), a)).toBe(true);
      }),
    );
  });

  test('a common factor of large degree is found', () => {
    fc.assert(
      fc.property(nonZero, nonZero, nonZero, (a, b, c) => {
        const common = gcdPolynomials(multiplyPolynomials(a, c), multiplyPolynomials(b, c));
        expect(degreeOf(remainderOf(common, c))).toBe(-1);
      }),
    );
  });

  test('x^15 − 1 and the generator of the (15,7) code share that generator', () => {
    const g = polynomialOf([0, 4, 6, 7, 8]); // Lin & Costello 2004, table of BCH codes: 1 + X^4 + X^6 + X^7 + X^8
    expect(exponentsOf(gcdPolynomials(xToTheNMinusOne(15), g))).toEqual([0, 4, 6, 7, 8]);
  });

  test('exponents and words are two spellings of one polynomial', () => {
    expect(exponentsOf(polynomialOf([70, 0, 31, 32, 31]))).toEqual([0, 32, 70]);
    expect(degreeOf(new Uint32Array(3))).toBe(-1);
  });

  test('division by zero and a negative exponent are refused', () => {
    expect(() => dividePolynomials(polynomialOf([3]), new Uint32Array(2))).toThrow(ParamError);
    expect(() => polynomialOf([-1])).toThrow(ParamError);
  });
});
