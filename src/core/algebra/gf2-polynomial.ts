import { ParamError } from '../errors.ts';

/** A polynomial over GF(2): bit i of the words, little-endian, is the coefficient of x^i. Leading zero words are allowed. */
export type Gf2Polynomial = Uint32Array;

/** The polynomial with ones at these exponents; an exponent named twice cancels. */
export function polynomialOf(exponents: Iterable<number>): Gf2Polynomial {
  const list = [...exponents];
  let top = 0;
  for (const e of list) {
    if (!Number.isInteger(e) || e < 0) throw new ParamError('exponents', e, 'non-negative integers');
    top = Math.max(top, e);
  }
  const words = new Uint32Array((top >>> 5) + 1);
  for (const e of list) words[e >>> 5]! ^= 1 << (e & 31);
  return words;
}

/** Exponents with coefficient one, ascending. */
export function exponentsOf(a: Gf2Polynomial): number[] {
  const exponents: number[] = [];
  for (let i = 0; i < a.length; i++) {
    for (let w = a[i]!; w !== 0; w &= w - 1) exponents.push(32 * i + 31 - Math.clz32(w & -w));
  }
  return exponents;
}

/** The degree; −1 for zero. */
export function degreeOf(a: Gf2Polynomial): number {
  let i = a.length - 1;
  while (i >= 0 && a[i] === 0) i--;
  return i < 0 ? -1 : 32 * i + 31 - Math.clz32(a[i]!);
}

/** Whether the two are the same polynomial, whatever their leading zero words. */
export function equalPolynomials(a: Gf2Polynomial, b: Gf2Polynomial): boolean {
  for (let i = Math.max(a.length, b.length) - 1; i >= 0; i--) if ((a[i] ?? 0) !== (b[i] ?? 0)) return false;
  return true;
}

export function addPolynomials(a: Gf2Polynomial, b: Gf2Polynomial): Gf2Polynomial {
  const sum = new Uint32Array(Math.max(a.length, b.length));
  sum.set(a);
  for (let i = 0; i < b.length; i++) sum[i]! ^= b[i]!;
  return sum;
}

/** target += source · x^shift in place; the target must be long enough. */
function addShifted(target: Gf2Polynomial, source: Gf2Polynomial, words: number, shift: number): void {
  const offset = shift >>> 5;
  const left = shift & 31;
  if (left === 0) {
    for (let i = 0; i < words; i++) target[i + offset]! ^= source[i]!;
    return;
  }
  const right = 32 - left;
  let carry = 0;
  for (let i = 0; i < words; i++) {
    const word = source[i]!;
    target[i + offset]! ^= (word << left) | carry;
    carry = word >>> right;
  }
  if (carry !== 0) target[words + offset]! ^= carry;
}

/** The product, by shifted additions of the denser factor: degree(a)·degree(b)/32 steps at worst. */
export function multiplyPolynomials(a: Gf2Polynomial, b: Gf2Polynomial): Gf2Polynomial {
  const [da, db] = [degreeOf(a), degreeOf(b)];
  if (da < 0 || db < 0) return new Uint32Array(1);
  const product = new Uint32Array(((da + db) >>> 5) + 1);
  const words = (db >>> 5) + 1;
  for (const e of exponentsOf(a)) addShifted(product, b, words, e);
  return product;
}

/** Quotient and remainder.
 *  @throws ParamError when the divisor is zero. */
export function dividePolynomials(
  a: Gf2Polynomial,
  divisor: Gf2Polynomial,
): { quotient: Gf2Polynomial; remainder: Gf2Polynomial } {
  const degree = degreeOf(divisor);
  if (degree < 0) throw new ParamError('divisor', 0, 'a polynomial other than zero');
  const remainder = a.slice();
  const quotient = new Uint32Array(Math.max(1, a.length));
  reduceInPlace(remainder, degreeOf(a), divisor, degree, quotient);
  return { quotient, remainder };
}

/** a modulo the divisor. */
export function remainderOf(a: Gf2Polynomial, divisor: Gf2Polynomial): Gf2Polynomial {
  return dividePolynomials(a, divisor).remainder;
}

/** Reduces a below the divisor's degree and returns the degree left. */
function reduceInPlace(
  a: Gf2Polynomial,
  degreeA: number,
  divisor: Gf2Polynomial,
  degree: number,
  quotient?: Gf2Polynomial,
): number {
  const words = (degree >>> 5) + 1;
  let d = degreeA;
  let top = d >>> 5;
  while (d >= degree) {
    const shift = d - degree;
    if (quotient) quotient[shift >>> 5]! ^= 1 << (shift & 31);
    addShifted(a, divisor, words, shift);
    while (top >= 0 && a[top] === 0) top--;
    d = top < 0 ? -1 : 32 * top + 31 - Math.clz32(a[top]!);
  }
  return d;
}

/** The greatest common divisor by Euclid's algorithm on words: each step clears about two leading bits at degree/32
 *  operations. A code of small redundancy meets its large divisor early, so the circulants of finite geometries are
 *  far below this worst case. */
export function gcdPolynomials(a: Gf2Polynomial, b: Gf2Polynomial): Gf2Polynomial {
  let [x, y] = [a.slice(), b.slice()];
  let [dx, dy] = [degreeOf(x), degreeOf(y)];
  while (dy >= 0) {
    dx = reduceInPlace(x, dx, y, dy);
    [x, y] = [y, x];
    [dx, dy] = [dy, dx];
  }
  return x.slice(0, Math.max(1, (dx >>> 5) + 1));
}

/** x^n − 1, which over GF(2) is x^n + 1. */
export function xToTheNMinusOne(n: number): Gf2Polynomial {
  return polynomialOf([0, n]);
}
