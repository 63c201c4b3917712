import { ParamError } from '../errors.ts';

/** A prime and its exponent in a factorisation. */
export interface PrimePower {
  p: number;
  m: number;
}

/** Whether n is prime, by trial division: exact for every safe integer, quick up to about 10^12. */
export function isPrime(n: number): boolean {
  if (!Number.isSafeInteger(n) || n < 2) return false;
  if (n % 2 === 0) return n === 2;
  for (let d = 3; d * d <= n; d += 2) if (n % d === 0) return false;
  return true;
}

/** The prime factorisation of a positive integer, primes ascending. factor(1) is empty.
 *  @throws ParamError unless n is a positive safe integer. */
export function factor(n: number): PrimePower[] {
  if (!Number.isSafeInteger(n) || n < 1) throw new ParamError('n', n, 'a positive integer below 2^53');
  const factors: PrimePower[] = [];
  let rest = n;
  for (let p = 2; p * p <= rest; p += p === 2 ? 1 : 2) {
    let m = 0;
    for (; rest % p === 0; m++) rest /= p;
    if (m > 0) factors.push({ p, m });
  }
  if (rest > 1) factors.push({ p: rest, m: 1 });
  return factors;
}

/** p and m with q = p^m, or null when q is not a prime power. */
export function primePowerOf(q: number): PrimePower | null {
  if (!Number.isSafeInteger(q) || q < 2) return null;
  const factors = factor(q);
  return factors.length === 1 ? factors[0]! : null;
}

/** Primes from 2 to max, by the sieve of Eratosthenes. */
export function primesUpTo(max: number): number[] {
  if (max < 2) return [];
  const composite = new Uint8Array(Math.floor(max) + 1);
  const primes: number[] = [];
  for (let p = 2; p < composite.length; p++) {
    if (composite[p]) continue;
    primes.push(p);
    for (let c = p * p; c < composite.length; c += p) composite[c] = 1;
  }
  return primes;
}

/** Prime powers from 2 to max, ascending. */
export function primePowersUpTo(max: number): number[] {
  const powers: number[] = [];
  for (const p of primesUpTo(max)) for (let q = p; q <= max; q *= p) powers.push(q);
  return powers.sort((a, b) => a - b);
}

/** The greatest common divisor of |a| and |b|. */
export function gcd(a: number, b: number): number {
  let [x, y] = [Math.abs(a), Math.abs(b)];
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

/** The representative of a modulo n in 0..n−1. */
export function mod(a: number, n: number): number {
  const r = a % n;
  return r < 0 ? r + n : r;
}

const EXACT_PRODUCT_LIMIT = 94_906_265; // largest n with n² < 2^53

/** a·b mod n, exact for every modulus below 2^53. */
export function multiplyModulo(a: number, b: number, n: number): number {
  return n <= EXACT_PRODUCT_LIMIT ? (a * b) % n : Number((BigInt(a) * BigInt(b)) % BigInt(n));
}

/** base^exponent mod n for a non-negative exponent. */
export function powerModulo(base: number, exponent: number, n: number): number {
  let result = 1 % n;
  let square = mod(base, n);
  for (let e = exponent; e > 0; e = Math.floor(e / 2)) {
    if (e % 2 === 1) result = multiplyModulo(result, square, n);
    square = multiplyModulo(square, square, n);
  }
  return result;
}

/** The inverse of a modulo n, by the extended Euclidean algorithm.
 *  @throws ParamError when a and n share a factor. */
export function inverseModulo(a: number, n: number): number {
  let [r0, r1, s0, s1] = [n, mod(a, n), 0, 1];
  while (r1 !== 0) {
    const quotient = Math.floor(r0 / r1);
    [r0, r1] = [r1, r0 - quotient * r1];
    [s0, s1] = [s1, s0 - quotient * s1];
  }
  if (r0 !== 1) throw new ParamError('a', a, `a number coprime to ${n}`);
  return mod(s0, n);
}

/** The least generator of the units modulo a prime.
 *  @throws ParamError unless p is a prime. */
export function primitiveRoot(p: number): number {
  if (!isPrime(p)) throw new ParamError('p', p, 'a prime');
  const divisors = factor(p - 1).map((f) => (p - 1) / f.p);
  let g = 1;
  while (divisors.some((d) => powerModulo(g, d, p) === 1)) g++;
  return g;
}

/** The Legendre symbol (a/p) for an odd prime p, by Euler's criterion. */
export function legendre(a: number, p: number): -1 | 0 | 1 {
  const e = powerModulo(a, (p - 1) / 2, p);
  return e === 0 ? 0 : e === 1 ? 1 : -1;
}

/** The non-zero squares modulo n, ascending. */
export function squaresModulo(n: number): number[] {
  const seen = new Uint8Array(n);
  for (let x = 1; x < n; x++) seen[multiplyModulo(x, x, n)] = 1;
  const squares: number[] = [];
  for (let x = 1; x < n; x++) if (seen[x]) squares.push(x);
  return squares;
}

/** Whether n is a sum of two integer squares: every prime ≡ 3 (mod 4) divides it to an even power (Fermat; Euler 1749). */
export function isSumOfTwoSquares(n: number): boolean {
  return n === 0 || factor(n).every(({ p, m }) => p % 4 !== 3 || m % 2 === 0);
}

/** The binomial coefficient as an exact number.
 *  @throws ParamError when it passes 2^53. */
export function binomial(n: number, k: number): number {
  if (k < 0 || k > n) return 0;
  let result = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) result = (result * BigInt(n - i + 1)) / BigInt(i);
  if (result > BigInt(Number.MAX_SAFE_INTEGER)) throw new ParamError('n', n, 'arguments whose binomial is below 2^53');
  return Number(result);
}

/** Subspaces of dimension k in an n-space over GF(q), the Gaussian binomial; exact below 2^53.
 *  Beyond that it is rounded, which only comparisons with a limit may rely on. */
export function gaussianBinomial(n: number, k: number, q: number): number {
  if (k < 0 || k > n) return 0;
  let [above, below] = [1n, 1n];
  const base = BigInt(q);
  for (let i = 0; i < k; i++) {
    above *= base ** BigInt(n - i) - 1n;
    below *= base ** BigInt(i + 1) - 1n;
  }
  return Number(above / below);
}
