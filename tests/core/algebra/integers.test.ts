import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  binomial,
  factor,
  gaussianBinomial,
  gcd,
  inverseModulo,
  isPrime,
  isSumOfTwoSquares,
  legendre,
  multiplyModulo,
  powerModulo,
  primePowerOf,
  primePowersUpTo,
  primesUpTo,
  primitiveRoot,
  squaresModulo,
} from '../../../src/core/algebra/integers.ts';
import { ParamError } from '../../../src/core/errors.ts';

describe('integers', () => {
  test('the sieve and trial division find the same 1,229 primes below 10,000', () => {
    const sieved = primesUpTo(9999);
    expect(sieved).toHaveLength(1229);
    expect(sieved).toEqual(Array.from({ length: 10_000 }, (_, n) => n).filter(isPrime));
  });

  test('a factorisation multiplies back to the number and holds primes only', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 2 ** 40 }), (n) => {
        const factors = factor(n);
        expect(factors.reduce((product, f) => product * f.p ** f.m, 1)).toBe(n);
        expect(factors.every((f) => isPrime(f.p))).toBe(true);
      }),
      { numRuns: 30 },
    );
  });

  test('a number that is not a positive integer is not factored', () => {
    for (const n of [0, -4, 1.5, Number.NaN, 2 ** 60]) expect(() => factor(n)).toThrow(ParamError);
  });

  test('prime powers up to 32 are the orders of the fields up to 32', () => {
    expect(primePowersUpTo(32)).toEqual([2, 3, 4, 5, 7, 8, 9, 11, 13, 16, 17, 19, 23, 25, 27, 29, 31, 32]);
    expect(primePowerOf(243)).toEqual({ p: 3, m: 5 });
    expect(primePowerOf(6)).toBeNull();
    expect(primePowerOf(1)).toBeNull();
  });

  test('an inverse times its number is one, and a common factor is refused', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 1e9 }), fc.integer({ min: 1, max: 1e9 }), (n, a) => {
        fc.pre(gcd(a, n) === 1);
        expect(multiplyModulo(inverseModulo(a, n), a % n, n)).toBe(1 % n);
      }),
    );
    expect(() => inverseModulo(6, 9)).toThrow(ParamError);
  });

  test('products modulo numbers near 2^53 are exact', () => {
    const n = Number.MAX_SAFE_INTEGER;
    expect(multiplyModulo(n - 1, n - 1, n)).toBe(1);
    expect(powerModulo(n - 1, 3, n)).toBe(n - 1);
  });

  test('a primitive root has every unit among its powers', () => {
    for (const p of primesUpTo(200)) {
      const powers = new Set(Array.from({ length: p - 1 }, (_, e) => powerModulo(primitiveRoot(p), e, p)));
      expect(powers.size).toBe(p - 1);
    }
  });

  test('the Legendre symbol is one exactly on the squares', () => {
    for (const p of [3, 7, 11, 13, 101]) {
      const squares = new Set(squaresModulo(p));
      for (let a = 0; a < p; a++) expect(legendre(a, p)).toBe(a === 0 ? 0 : squares.has(a) ? 1 : -1);
    }
  });

  test('sums of two squares agree with a search', () => {
    for (let n = 1; n <= 300; n++) {
      const found = Array.from({ length: 18 }, (_, a) => n - a * a).some(
        (rest) => rest >= 0 && Number.isInteger(Math.sqrt(rest)),
      );
      expect(isSumOfTwoSquares(n)).toBe(found);
    }
  });

  test('binomials: C(24,5) is 42,504 and PG(3,2) has 35 lines', () => {
    expect(binomial(24, 5)).toBe(42_504);
    expect(gaussianBinomial(4, 2, 2)).toBe(35);
    expect(gaussianBinomial(3, 4, 2)).toBe(0);
  });
});
