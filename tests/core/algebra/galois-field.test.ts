import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { galoisField, subfieldOf, traceOf } from '../../../src/core/algebra/galois-field.ts';
import { primePowersUpTo } from '../../../src/core/algebra/integers.ts';
import { powerOfX, primitivePolynomial, shiftByX } from '../../../src/core/algebra/primitive-polynomial.ts';
import { LimitError, ParamError } from '../../../src/core/errors.ts';

describe('finite fields', () => {
  test('every field of order up to 1,024 has a generator whose powers are all its non-zero elements', () => {
    for (const q of primePowersUpTo(1024)) {
      const F = galoisField(q);
      expect(new Set(F.exp.subarray(0, q - 1)).size).toBe(q - 1);
      expect(F.exp.subarray(0, q - 1).every((a) => a > 0 && a < q)).toBe(true);
    }
  });

  test('the field axioms hold for all triples of the fields up to 16', () => {
    for (const q of primePowersUpTo(16)) {
      const F = galoisField(q);
      for (let a = 0; a < q; a++) {
        expect(F.add(a, 0)).toBe(a);
        expect(F.mul(a, 1)).toBe(a);
        expect(F.add(a, F.neg(a))).toBe(0);
        if (a > 0) expect(F.mul(a, F.inv(a))).toBe(1);
        for (let b = 0; b < q; b++) {
          expect(F.add(a, b)).toBe(F.add(b, a));
          expect(F.sub(F.add(a, b), b)).toBe(a);
          for (let c = 0; c < q; c++) {
            expect(F.add(F.add(a, b), c)).toBe(F.add(a, F.add(b, c)));
            expect(F.mul(F.mul(a, b), c)).toBe(F.mul(a, F.mul(b, c)));
            expect(F.mul(a, F.add(b, c))).toBe(F.add(F.mul(a, b), F.mul(a, c)));
          }
        }
      }
    }
  });

  test('in larger fields sums are sums of base-p digits, and Frobenius is additive', () => {
    const orders = [243, 343, 361, 512, 625, 729, 961, 1024, 4096, 6561, 2 ** 16];
    fc.assert(
      fc.property(fc.constantFrom(...orders), fc.nat(), fc.nat(), (q, x, y) => {
        const F = galoisField(q);
        const [a, b] = [x % q, y % q];
        const digits = (n: number) => Array.from({ length: F.m }, (_, i) => Math.floor(n / F.p ** i) % F.p);
        const sum = digits(a).map((d, i) => (d + digits(b)[i]!) % F.p);
        expect(digits(F.add(a, b))).toEqual(sum);
        expect(F.pow(F.add(a, b), F.p)).toBe(F.add(F.pow(a, F.p), F.pow(b, F.p)));
        expect(F.pow(a, q)).toBe(a);
      }),
    );
  });

  test('a subfield is closed under both operations and its order must divide', () => {
    const F = galoisField(64);
    for (const s of [2, 4, 8, 64]) {
      const sub = new Set(subfieldOf(F, s));
      expect(sub.size).toBe(s);
      for (const a of sub) for (const b of sub) expect(sub.has(F.add(a, b)) && sub.has(F.mul(a, b))).toBe(true);
    }
    expect(() => subfieldOf(F, 16)).toThrow(ParamError);
  });

  test('the trace takes every value of the prime field equally often', () => {
    for (const q of [8, 9, 27, 64, 81]) {
      const F = galoisField(q);
      const counts = new Array<number>(F.p).fill(0);
      for (let a = 0; a < q; a++) counts[traceOf(F, a)]!++;
      expect(counts).toEqual(new Array(F.p).fill(q / F.p));
    }
  });

  test('zero has no inverse, 6 is no field order, and 2^23 elements are over the limit', () => {
    expect(() => galoisField(8).inv(0)).toThrow(ParamError);
    expect(() => galoisField(8).pow(0, -1)).toThrow(ParamError);
    expect(() => galoisField(6)).toThrow(ParamError);
    expect(() => galoisField(2 ** 23)).toThrow(LimitError);
  });
});

describe('primitive polynomials', () => {
  test('walking by x passes through every non-zero element once', () => {
    for (const [q, degree] of [
      [2, 1],
      [2, 8],
      [3, 4],
      [4, 3],
      [5, 3],
      [9, 2],
      [16, 3],
    ] as const) {
      const F = galoisField(q);
      const modulus = primitivePolynomial(F, degree);
      const element = new Uint32Array(degree);
      element[0] = 1;
      const seen = new Set<string>();
      for (let i = 0; i < q ** degree - 1; i++) {
        seen.add(element.join());
        shiftByX(F, modulus, element);
      }
      expect(seen.size).toBe(q ** degree - 1);
    }
  });

  test('powers of x agree with repeated steps', () => {
    const F = galoisField(9);
    const modulus = primitivePolynomial(F, 3);
    const element = new Uint32Array([1, 0, 0]);
    for (let e = 0; e < 60; e++) {
      expect([...powerOfX(F, modulus, e)]).toEqual([...element]);
      shiftByX(F, modulus, element);
    }
  });
});
