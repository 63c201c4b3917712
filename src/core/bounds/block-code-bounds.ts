import { ParamError } from '../errors.ts';
import { logBall } from './bsc-converse.ts';

/** Sphere packing: log2 of the most words a binary code of length n and distance d can have (Hamming 1950). */
export function hammingBound({ n, d }: { n: number; d: number }): number {
  requireDistance(n, d);
  return -logBall(n, Math.floor((d - 1) / 2)) * Math.LOG2E;
}

/** Greatest k for which a linear [n, k] code of distance d is sure to exist: the columns of a parity-check matrix can be
 *  picked one by one while Σ_{i ≤ d−2} C(n−1, i) < 2^(n−k) (Varshamov 1957; Gilbert 1952 for any code). */
export function gilbertVarshamovBound({ n, d }: { n: number; d: number }): number {
  requireDistance(n, d);
  if (d === 1) return n;
  if (n === 1) return 0;
  const logWords = n - 1 + logBall(n - 1, d - 2) * Math.LOG2E;
  // A sum that is a power of two to within rounding is not below it.
  return Math.max(0, n - Math.floor(logWords + 1e-9) - 1);
}

/** The most words of a binary code whose distance is more than half its length: 2⌊d/(2d − n)⌋ for even d, 2n + 2 … as d
 *  nears n/2 (Plotkin 1960; MacWilliams and Sloane 1977, ch. 2, §2). Null where 2d < n, of which it says nothing. */
export function plotkinBound({ n, d }: { n: number; d: number }): number | null {
  requireDistance(n, d);
  // A code of odd distance gains a parity bit and one of distance.
  if (d % 2 === 1) return plotkinBound({ n: n + 1, d: d + 1 });
  if (2 * d > n) return 2 * Math.floor(d / (2 * d - n));
  return 2 * d === n ? 4 * d : null;
}

/** log2 of the most words a code of length n and distance d can have: n − d + 1 (Singleton 1964). */
export function singletonBound({ n, d }: { n: number; d: number }): number {
  requireDistance(n, d);
  return n - d + 1;
}

function requireDistance(n: number, d: number): void {
  if (!Number.isSafeInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of 1 or more');
  if (!Number.isSafeInteger(d) || d < 1 || d > n + 1) throw new ParamError('d', d, `a whole number from 1 to n = ${n}`);
}
