import { seededRandom } from '../../../algebra/seeded-random.ts';
import { type BitMatrix, popcount32 } from '../../../gf2/bit-matrix.ts';
import { nullSpace, reducedEchelon } from '../../../gf2/echelon.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';

export interface LowWeightWord {
  weight: number;
  /** Positions of its ones, ascending. */
  positions: Uint32Array;
}

/** A codeword of low weight by information-set decoding, one column exchanged a step (Leon 1988; Canteaut and Chabaud 1998):
 *  generator rows, and sums of two of them, that are light outside the information set. Its weight bounds the distance
 *  from above; that nothing lighter was met proves nothing. Null when k = 0. The same seed finds the same word. Ends early
 *  with a word of weight `goal` or less, where a lower bound says that none is lighter. */
export function searchLowWeight(
  H: SparseMatrix,
  options: { seed: string; wordOperations: number; goal?: number },
): LowWeightWord | null {
  const { basis, free } = nullSpace(reducedEchelon(H));
  const k = free.length;
  if (k === 0) return null;
  const random = seededRandom(options.seed);
  const { cols: n, stride } = basis;
  const information = Uint32Array.from(free);
  const inside = new Uint8Array(n);
  for (const c of free) inside[c] = 1;
  let best: Uint32Array | null = null;
  let least = n + 1;
  const offer = (weight: number, word: () => Uint32Array) => {
    if (weight === 0 || weight >= least) return;
    least = weight;
    best = word();
  };
  for (let r = 0; r < k; r++) offer(weightOf(basis.row(r)), () => basis.row(r).slice());
  const steps = k === n ? 0 : Math.floor(options.wordOperations / (2 * k * stride));
  for (let step = 0; step < steps && least > (options.goal ?? 0); step++) {
    const row = random.below(k);
    const column = otherColumn(basis, row, inside, random.below(n));
    if (column < 0) continue;
    inside[information[row]!] = 0;
    inside[column] = 1;
    information[row] = column;
    for (let r = 0; r < k; r++) {
      if (r === row) continue;
      if (basis.get(r, column)) basis.addRow(r, row);
      offer(weightOf(basis.row(r)), () => basis.row(r).slice());
      offer(weightOfSum(basis, r, row), () => basis.row(r).map((word, w) => word ^ basis.row(row)[w]!));
    }
  }
  return best && { weight: least, positions: onesOf(best, n) };
}

/** A column outside the information set where the row holds a one, the first from a place on. */
function otherColumn(basis: BitMatrix, row: number, inside: Uint8Array, from: number): number {
  for (let i = 0; i < basis.cols; i++) {
    const c = (from + i) % basis.cols;
    if (!inside[c] && basis.get(row, c)) return c;
  }
  return -1;
}

function weightOf(words: Uint32Array): number {
  let weight = 0;
  for (const word of words) weight += popcount32(word);
  return weight;
}

function weightOfSum({ words, stride }: BitMatrix, a: number, b: number): number {
  let weight = 0;
  for (let w = 0; w < stride; w++) weight += popcount32(words[a * stride + w]! ^ words[b * stride + w]!);
  return weight;
}

function onesOf(words: Uint32Array, n: number): Uint32Array {
  return Uint32Array.from({ length: n }, (_, c) => c).filter((c) => (words[c >>> 5]! >>> (c & 31)) & 1);
}
