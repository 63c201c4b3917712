import { LimitError, ParamError } from '../errors.ts';
import { factor, mod, primePowerOf, primitiveRoot } from './integers.ts';

/** Largest field whose tables are kept: three tables of 4 bytes an element. */
export const LARGEST_TABLED_FIELD = 1 << 22;

/** GF(p^m) by tables of logarithms. An element is a number 0..q−1 whose digits in base p are the coefficients of a
 *  polynomial in the generator; so 0..p−1 are the prime field and, for p = 2, addition is XOR. For m > 1 the generator
 *  itself is written p. Sums for odd p with m > 1 use Zech's logarithms, so memory grows with q, not q². */
export interface GaloisField {
  readonly q: number;
  readonly p: number;
  readonly m: number;
  /** exp[i] = generator^i for i from 0 to 2(q − 1), so that a sum of two logarithms needs no reduction. */
  readonly exp: Uint32Array;
  /** log[exp[i]] = i for 0 ≤ i < q − 1; log[0] has no meaning. */
  readonly log: Uint32Array;
  /** Digits in base p of the defining primitive polynomial without its leading one, constant term first. */
  readonly modulus: readonly number[];
  add(a: number, b: number): number;
  sub(a: number, b: number): number;
  neg(a: number): number;
  mul(a: number, b: number): number;
  /** @throws ParamError for zero. */
  inv(a: number): number;
  /** a^e for e ≥ 0, or for any integer e when a is not zero. */
  pow(a: number, e: number): number;
}

const cache = new Map<number, GaloisField>();

/** The field with q elements; the same tables are handed out again for the same small q.
 *  @throws ParamError unless q is a prime power; LimitError above 2^22. */
export function galoisField(q: number): GaloisField {
  const known = cache.get(q);
  if (known) return known;
  const order = primePowerOf(q);
  if (!order) throw new ParamError('q', q, 'a prime power');
  if (q > LARGEST_TABLED_FIELD) throw new LimitError('tables of a finite field', q, LARGEST_TABLED_FIELD, 'elements');
  const field = makeField(q, order.p, order.m);
  if (q <= 4096) cache.set(q, field);
  return field;
}

function makeField(q: number, p: number, m: number): GaloisField {
  const modulus = primitiveModulus(q, p, m);
  const { exp, log } = powerTables(q, p, modulus);
  const add = addition(q, p, m, exp, log);
  const neg = negation(q, p, exp, log);
  const mul = (a: number, b: number) => (a === 0 || b === 0 ? 0 : exp[log[a]! + log[b]!]!);
  const inv = (a: number) => {
    if (a === 0) throw new ParamError('a', a, 'a non-zero element');
    return exp[q - 1 - log[a]!]!;
  };
  const pow = (a: number, e: number) => {
    if (e === 0) return 1;
    if (a === 0) return e > 0 ? 0 : inv(0);
    return exp[mod(log[a]! * mod(e, q - 1), q - 1)]!;
  };
  return { q, p, m, exp, log, modulus, add, sub: (a, b) => add(a, neg(b)), neg, mul, inv, pow };
}

/** Multiplies the element by the generator: shifts its digits up and folds the leading one back. */
function timesGenerator(a: number, p: number, top: number, reduction: readonly number[]): number {
  const lead = Math.floor(a / top);
  let product = (a - lead * top) * p;
  if (lead === 0) return product;
  if (p === 2) return product ^ reduction[0]!;
  let scale = 1;
  let result = 0;
  for (const digit of reduction) {
    result += (((product % p) + lead * digit) % p) * scale;
    product = Math.floor(product / p);
    scale *= p;
  }
  return result;
}

/** The reduction x^m = Σ reduction[i] x^i; for p = 2 packed in one number. */
function reductionOf(p: number, modulus: readonly number[]): readonly number[] {
  const digits = modulus.map((c) => mod(-c, p));
  return p === 2 ? [digits.reduce((sum, c, i) => sum + c * 2 ** i, 0)] : digits;
}

function primitiveModulus(q: number, p: number, m: number): number[] {
  if (m === 1) return [mod(-primitiveRoot(p), p)];
  const cofactors = factor(q - 1).map((f) => (q - 1) / f.p);
  // Lexicographic search. The constant term must be (−1)^m times a primitive root: the norm of a generator generates.
  for (let candidate = 1; candidate < q; candidate++) {
    const modulus = digitsOf(candidate, p, m);
    if (modulus[0] !== 0 && generates(p, m, modulus, q - 1, cofactors)) return modulus;
  }
  throw new ParamError('q', q, 'a prime power');
}

/** Whether x has multiplicative order exactly `order` modulo x^m + modulus. */
function generates(p: number, m: number, modulus: number[], order: number, cofactors: number[]): boolean {
  const isOne = (e: number) => powerOfX(e, p, m, modulus).every((c, i) => c === (i === 0 ? 1 : 0));
  return isOne(order) && !cofactors.some(isOne);
}

function powerOfX(e: number, p: number, m: number, modulus: number[]): number[] {
  let result = oneOf(m);
  const x = m === 1 ? [mod(-modulus[0]!, p)] : Array.from({ length: m }, (_, i) => (i === 1 ? 1 : 0));
  for (let bit = 2 ** Math.floor(Math.log2(e)); bit >= 1; bit /= 2) {
    result = multiplyDigits(result, result, p, m, modulus);
    if (Math.floor(e / bit) % 2 === 1) result = multiplyDigits(result, x, p, m, modulus);
  }
  return result;
}

function oneOf(m: number): number[] {
  return Array.from({ length: m }, (_, i) => (i === 0 ? 1 : 0));
}

function multiplyDigits(a: number[], b: number[], p: number, m: number, modulus: number[]): number[] {
  const product = new Array<number>(2 * m - 1).fill(0);
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) product[i + j] = (product[i + j]! + a[i]! * b[j]!) % p;
  for (let d = 2 * m - 2; d >= m; d--) {
    for (let i = 0; i < m; i++) product[d - m + i] = mod(product[d - m + i]! - product[d]! * modulus[i]!, p);
  }
  return product.slice(0, m);
}

function digitsOf(value: number, p: number, m: number): number[] {
  const digits: number[] = [];
  for (let i = 0, rest = value; i < m; i++, rest = Math.floor(rest / p)) digits.push(rest % p);
  return digits;
}

function powerTables(q: number, p: number, modulus: number[]): { exp: Uint32Array; log: Uint32Array } {
  const exp = new Uint32Array(2 * q - 1);
  const log = new Uint32Array(q);
  const reduction = reductionOf(p, modulus);
  const generator = reduction[0]!;
  let a = 1;
  for (let i = 0; i < q - 1; i++) {
    exp[i] = a;
    log[a] = i;
    a = modulus.length === 1 ? (a * generator) % p : timesGenerator(a, p, q / p, reduction);
  }
  for (let i = q - 1; i < exp.length; i++) exp[i] = exp[i - (q - 1)]!;
  return { exp, log };
}

function negation(q: number, p: number, exp: Uint32Array, log: Uint32Array): (a: number) => number {
  if (p === 2) return (a) => a;
  const half = (q - 1) / 2; // −1 is the element of order two
  return (a) => (a === 0 ? 0 : exp[log[a]! + half]!);
}

function addition(q: number, p: number, m: number, exp: Uint32Array, log: Uint32Array) {
  if (p === 2) return (a: number, b: number) => a ^ b;
  if (m === 1) return (a: number, b: number) => (a + b < p ? a + b : a + b - p);
  // zech[i] = log(1 + g^i), one more than the logarithm so that 0 can say that the sum vanishes.
  const zech = new Uint32Array(q - 1);
  for (let i = 0; i < q - 1; i++) {
    const next = (exp[i]! % p) + 1 === p ? exp[i]! + 1 - p : exp[i]! + 1;
    zech[i] = next === 0 ? 0 : log[next]! + 1;
  }
  return (a: number, b: number) => {
    if (a === 0) return b;
    if (b === 0) return a;
    const difference = log[b]! - log[a]!;
    const z = zech[difference < 0 ? difference + q - 1 : difference]!;
    return z === 0 ? 0 : exp[log[a]! + z - 1]!;
  };
}

/** Elements of the subfield GF(s) of GF(q): zero and the powers of generator^((q−1)/(s−1)).
 *  @throws ParamError unless GF(s) is a subfield. */
export function subfieldOf(field: GaloisField, s: number): number[] {
  const sub = primePowerOf(s);
  if (!sub || sub.p !== field.p || field.m % sub.m !== 0)
    throw new ParamError('s', s, `the order of a subfield of GF(${field.q})`);
  const step = (field.q - 1) / (s - 1);
  return [0, ...Array.from({ length: s - 1 }, (_, i) => field.exp[i * step]!)];
}

/** The absolute trace, as an element 0..p−1 of the prime field. */
export function traceOf(field: GaloisField, a: number): number {
  let sum = 0;
  for (let i = 0, power = a; i < field.m; i++, power = field.pow(power, field.p)) sum = field.add(sum, power);
  return sum;
}
