import { degreeOf, type Gf2Polynomial } from '../../algebra/gf2-polynomial.ts';
import { ParamError } from '../../errors.ts';
import { reducedEchelon } from '../../gf2/echelon.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { cyclicGenerator } from './generator-polynomial.ts';

/** Any encoder that shows the information bits in the clear. */
export interface WordEncoder {
  k: number;
  /** Positions of the codeword that carry the information bits, in the order of these bits. */
  infoPositions: Uint32Array;
  /** The codeword of k information bits, one byte 0 or 1 a bit.
   *  @throws ParamError when the word's length is not k. */
  encode(info: Uint8Array): Uint8Array;
}

export interface SystematicEncoder extends WordEncoder {
  /** How the parity bits are found. */
  method: 'polynomial division' | 'dense parity rows';
  /** For each information bit in turn, the other positions' bits, in ascending order of position, of the word in which
   *  it alone is one: the rows of P where G = [I P]. Much quicker than encoding them one by one. */
  parityRows(): Generator<Uint8Array>;
}

/** An encoder for {c : H·c = 0} that shows the information bits in the clear. Cyclic codes divide by the generator
 *  polynomial and carry their parity in the first n − k places; others by the reduced echelon form, with the parity as
 *  far to the right as the matrix allows. */
export function systematicEncoder(code: { H: SparseMatrix }): SystematicEncoder {
  const g = cyclicGenerator(code.H);
  return g ? cyclicEncoder(code.H.cols, g) : denseEncoder(code.H);
}

/** c(x) = x^(n−k) m(x) + (x^(n−k) m(x) mod g(x)) (Peterson and Weldon 1972, ch. 8). */
export function cyclicEncoder(n: number, g: Gf2Polynomial): SystematicEncoder {
  const parity = Math.min(n, degreeOf(g));
  const k = n - parity;
  const infoPositions = Uint32Array.from({ length: k }, (_, i) => parity + i);
  return {
    k,
    infoPositions,
    method: 'polynomial division',
    encode(info) {
      requireLength(info, k);
      const register = remainder(info, g, parity);
      const word = new Uint8Array(n);
      for (let i = 0; i < parity; i++) word[i] = (register[i >>> 5]! >>> (i & 31)) & 1;
      word.set(info, parity);
      return word;
    },
    *parityRows() {
      // Row i is x^(n−k+i) mod g: one step of the shift register with nothing coming in.
      const register = remainder(Uint8Array.of(1), g, parity);
      for (let i = 0; i < k; i++) {
        const row = new Uint8Array(parity);
        for (let j = 0; j < parity; j++) row[j] = (register[j >>> 5]! >>> (j & 31)) & 1;
        yield row;
        clock(register, 0, g, parity);
      }
    },
  };
}

/** x^parity · m(x) mod g(x): the shift register, highest coefficient first. */
function remainder(info: Uint8Array, g: Gf2Polynomial, parity: number): Uint32Array {
  const register = new Uint32Array(Math.max(1, (parity + 31) >>> 5));
  if (parity > 0) for (let i = info.length - 1; i >= 0; i--) clock(register, info[i]!, g, parity);
  return register;
}

/** One step of the register: times x, plus the coming bit times x^parity, modulo g. */
function clock(register: Uint32Array, bit: number, g: Gf2Polynomial, parity: number): void {
  if (parity === 0) return;
  const words = register.length;
  const top = parity - 1;
  const feedback = ((register[top >>> 5]! >>> (top & 31)) & 1) ^ bit;
  for (let w = words - 1; w > 0; w--) register[w] = (register[w]! << 1) | (register[w - 1]! >>> 31);
  register[0]! <<= 1;
  if (feedback) for (let w = 0; w < words; w++) register[w]! ^= g[w]!;
  register[words - 1]! &= parity & 31 ? 2 ** (parity & 31) - 1 : 0xffffffff;
}

/** Any code: parity bit i is the sum of the information bits in row i of the reduced echelon form. */
export function denseEncoder(H: SparseMatrix): SystematicEncoder {
  const n = H.cols;
  const fromTheRight = Uint32Array.from({ length: n }, (_, i) => n - 1 - i);
  const { rank, pivots, matrix } = reducedEchelon(H, fromTheRight);
  const isPivot = new Uint8Array(n);
  for (const c of pivots) isPivot[c] = 1;
  const infoPositions = Uint32Array.from({ length: n }, (_, c) => c).filter((c) => !isPivot[c]);
  return {
    k: n - rank,
    infoPositions,
    method: 'dense parity rows',
    encode(info) {
      requireLength(info, n - rank);
      const packed = new Uint32Array(matrix.stride);
      const word = new Uint8Array(n);
      infoPositions.forEach((c, i) => {
        word[c] = info[i]! & 1;
        if (info[i]! & 1) packed[c >>> 5]! |= 1 << (c & 31);
      });
      for (let r = 0; r < rank; r++) word[pivots[r]!] = parityOfAnd(matrix.row(r), packed);
      return word;
    },
    *parityRows() {
      const ascending = Uint32Array.from(pivots.keys()).sort((a, b) => pivots[a]! - pivots[b]!);
      for (const c of infoPositions) {
        const row = new Uint8Array(rank);
        for (let j = 0; j < rank; j++) row[j] = matrix.get(ascending[j]!, c);
        yield row;
      }
    },
  };
}

function parityOfAnd(a: Uint32Array, b: Uint32Array): number {
  let sum = 0;
  for (let w = 0; w < a.length; w++) sum ^= a[w]! & b[w]!;
  sum ^= sum >>> 16;
  sum ^= sum >>> 8;
  sum ^= sum >>> 4;
  return (0x6996 >>> (sum & 15)) & 1;
}

function requireLength(info: Uint8Array, k: number): void {
  if (info.length !== k) throw new ParamError('info', info.length, `${k} information bits`);
}
