import { LimitError, ParamError } from '../errors.ts';
import { logBinomialTail } from '../statistics/binomial-tail.ts';

export interface BchReference {
  /** Errors that the bounded-distance decoder corrects in every word. */
  t: number;
  /** Parity bits that such a code needs; the rest of n − k is unused. */
  parityBits: number;
  /** The code is the narrow-sense primitive one of length 2^m − 1, shortened to n. */
  m: number;
  /** Frame error rate on the binary symmetric channel: P(more than t errors). */
  fer(p: number): number;
}

/** The narrow-sense binary BCH code to compare with: the primitive length next above n, shortened to n, and the largest t
 *  whose generator, the product of the minimal polynomials of α, α³, …, α^(2t−1), has degree n − k or less (Hocquenghem
 *  1959; Bose and Ray-Chaudhuri 1960). A bounded-distance decoder fails exactly when more than t errors occur, which
 *  counts miscorrections as failures.
 *  @throws ParamError unless 0 < k ≤ n. @throws LimitError above 2^20 − 1. */
export function bchReference({ n, k }: { n: number; k: number }): BchReference {
  if (!Number.isInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of 1 or more');
  if (!Number.isInteger(k) || k < 1 || k > n) throw new ParamError('k', k, `a whole number from 1 to n = ${n}`);
  if (n > 2 ** 20 - 1) throw new LimitError('BCH length', n, 2 ** 20 - 1, 'bits');
  const m = Math.max(2, Math.ceil(Math.log2(n + 1)));
  const { t, parityBits } = largestRadius(m, n - k);
  return { t, parityBits, m, fer: (p) => (p === 0 ? 0 : Math.exp(logBinomialTail(n, p, t))) };
}

function largestRadius(m: number, parityBits: number): { t: number; parityBits: number } {
  const length = 2 ** m - 1;
  const isRoot = new Uint8Array(length);
  let degree = 0;
  let t = 0;
  for (let i = 1; i < length; i += 2) {
    if (!isRoot[i]) {
      const coset = cyclotomicCoset(i, length);
      if (degree + coset.length > parityBits) break;
      for (const j of coset) isRoot[j] = 1;
      degree += coset.length;
    }
    // Roots α^1 … α^i, and α^(i+1), whose exponent is twice a smaller one.
    t = (i + 1) / 2;
  }
  return { t, parityBits: degree };
}

function cyclotomicCoset(start: number, length: number): number[] {
  const coset = [start];
  for (let j = (2 * start) % length; j !== start; j = (2 * j) % length) coset.push(j);
  return coset;
}
