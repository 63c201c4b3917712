import { ParamError } from '../errors.ts';
import type { GaloisField } from './galois-field.ts';
import { factor } from './integers.ts';

/** A monic polynomial of the degree over GF(q), primitive over it: x generates GF(q^degree). Coefficients constant term
 *  first, the leading one left out. GF(q^degree) itself needs no table: walk powers of x with `shiftByX`.
 *
 *  The constant term is fixed to (−1)^degree times the field's generator, the norm of x, which must be primitive in
 *  GF(q); this leaves about φ(q^d−1)/(d·φ(q−1)·q^(d−1)) of the candidates, so the search is short.
 *  @throws ParamError when q^degree passes 2^53. */
export function primitivePolynomial(field: GaloisField, degree: number): Uint32Array {
  const order = field.q ** degree - 1;
  if (!Number.isSafeInteger(order))
    throw new ParamError('degree', degree, `a degree with ${field.q}^degree below 2^53`);
  const cofactors = factor(order).map((f) => order / f.p);
  const generator = field.exp[1 % (field.q - 1)]!;
  const constant = degree % 2 === 0 ? generator : field.neg(generator);
  const candidate = new Uint32Array(degree);
  candidate[0] = constant;
  for (;;) {
    if (isPrimitive(field, candidate, order, cofactors)) return candidate;
    let i = 1;
    while (i < degree && candidate[i] === field.q - 1) candidate[i++] = 0;
    if (i >= degree) throw new ParamError('degree', degree, 'a degree of at least 1');
    candidate[i]!++;
  }
}

function isPrimitive(field: GaloisField, modulus: Uint32Array, order: number, cofactors: number[]): boolean {
  return isOne(powerOfX(field, modulus, order)) && !cofactors.some((e) => isOne(powerOfX(field, modulus, e)));
}

function isOne(a: Uint32Array): boolean {
  return a[0] === 1 && a.subarray(1).every((c) => c === 0);
}

/** Multiplies the element by x in place: one step of the linear recurrence that the modulus defines. */
export function shiftByX(field: GaloisField, modulus: Uint32Array, element: Uint32Array): void {
  const degree = modulus.length;
  const lead = field.neg(element[degree - 1]!);
  for (let i = degree - 1; i > 0; i--) element[i] = field.add(element[i - 1]!, field.mul(lead, modulus[i]!));
  element[0] = field.mul(lead, modulus[0]!);
}

function multiply(field: GaloisField, modulus: Uint32Array, a: Uint32Array, b: Uint32Array): Uint32Array {
  const degree = modulus.length;
  const sum = new Uint32Array(degree);
  for (let i = degree - 1; i >= 0; i--) {
    shiftByX(field, modulus, sum);
    for (let j = 0; j < degree; j++) sum[j] = field.add(sum[j]!, field.mul(a[i]!, b[j]!));
  }
  return sum;
}

/** x^e modulo the polynomial, by squaring. */
export function powerOfX(field: GaloisField, modulus: Uint32Array, e: number): Uint32Array {
  let result: Uint32Array = new Uint32Array(modulus.length);
  result[0] = 1;
  if (e === 0) return result;
  for (let bit = 2 ** Math.floor(Math.log2(e)); bit >= 1; bit /= 2) {
    result = multiply(field, modulus, result, result);
    if (Math.floor(e / bit) % 2 === 1) shiftByX(field, modulus, result);
  }
  return result;
}
