import { degreeOf, dividePolynomials, exponentsOf, xToTheNMinusOne } from '../../algebra/gf2-polynomial.ts';
import { ParamError } from '../../errors.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { cyclicGenerator } from './generator-polynomial.ts';
import type { WordEncoder } from './systematic-encoder.ts';

/** The shift registers that encode a cyclic code (Peterson and Weldon 1972, ch. 8; Lin and Costello 2004, §5.3). */
export interface ShiftRegister {
  n: number;
  k: number;
  /** Exponents of the generator polynomial g, ascending: the register of n − k stages divides by it. Stage i is fed the
   *  sum of stage i − 1 and the feedback for each exponent i from 0 to n − k − 1. */
  generator: number[];
  /** Exponents of the parity polynomial h = (x^n + 1)/g, ascending: the register of k stages makes each parity bit from
   *  the k bits before it. */
  parity: number[];
  /** Stages of the generator register that the feedback enters besides stage 0. */
  taps: number[];
}

/** Null when the rows of H are not closed under the cyclic shift. */
export function shiftRegister(H: SparseMatrix): ShiftRegister | null {
  const g = cyclicGenerator(H);
  if (!g) return null;
  const n = H.cols;
  const degree = degreeOf(g);
  const h = dividePolynomials(xToTheNMinusOne(n), g).quotient;
  const generator = exponentsOf(g);
  return {
    n,
    k: n - degree,
    generator,
    parity: exponentsOf(h),
    taps: generator.filter((e) => e > 0 && e < degree),
  };
}

/** Encodes as the register of h does, k bits of memory: c_{i} = Σ h_j c_{i+j} over j = 1 … k, from the top down, since h·c
 *  has no terms from x^k to x^(n−1). The words are those of division by g, information in the last k places. */
export function parityRegisterEncoder({ n, k, parity }: ShiftRegister): WordEncoder {
  // h is monic with h_0 = 1; the coefficient of x^(i+k) in h·c is Σ h_j c_(i+k−j).
  const terms = parity.filter((e) => e < k).map((e) => k - e);
  return {
    k,
    infoPositions: Uint32Array.from({ length: k }, (_, i) => n - k + i),
    encode(info) {
      if (info.length !== k) throw new ParamError('info', info.length, `${k} information bits`);
      const word = new Uint8Array(n);
      for (let i = 0; i < k; i++) word[n - k + i] = info[i]! & 1;
      for (let i = n - k - 1; i >= 0; i--) {
        let sum = 0;
        for (const ahead of terms) sum ^= word[i + ahead]!;
        word[i] = sum;
      }
      return word;
    },
  };
}
