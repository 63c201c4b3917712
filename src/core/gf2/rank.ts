import { type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';
import { LimitError } from '../errors.ts';
import { PACKED_LIMIT_BYTES } from './bit-matrix.ts';
import { cyclicRank } from './cyclic.ts';
import { fourRussiansRank } from './four-russians.ts';
import { peel } from './peel.ts';
import { type QuasiCyclicForm, quasiCyclicForm } from './quasi-cyclic.ts';
import { quasiCyclicRank, quasiCyclicWork } from './quasi-cyclic-rank.ts';

export interface RankFound {
  rank: number;
  method: string;
}

/** Rank over GF(2). Matrices whose rows are closed under the cyclic shift of the columns are ranked by a polynomial gcd,
 *  quasi-cyclic ones block by block where that is less work, all others by elimination.
 *  @throws LimitError when the packed matrix does not fit. */
export function rank(H: SparseMatrix): number {
  return findRank(H).rank;
}

/** The rank, and by which of the three ways it was found. The quasi-cyclic form may be given where it is known, or null
 *  where it is known that there is none. */
export function findRank(H: SparseMatrix, known?: QuasiCyclicForm | null): RankFound {
  const cyclic = cyclicRank(H);
  if (cyclic !== null) return { rank: cyclic, method: 'n − deg gcd(rows, x^n + 1)' };
  const form = known === undefined && H.colIndex.length >= KERNEL_FROM_ONES ? quasiCyclicForm(H) : known;
  if (form && quasiCyclicWork(form) < eliminationWork(H)) {
    const method = `block by block over GF(2)[x]/(x^${form.size} + 1)`;
    return { rank: quasiCyclicRank(form), method };
  }
  return { rank: eliminationRank(H), method: 'elimination over GF(2)' };
}

/** Nanoseconds that the kernel takes, about: it adds five rows of cols/128 words once for 32 pivots. */
function eliminationWork({ rows, cols }: SparseMatrix): number {
  return rows * cols * Math.min(rows, cols) * 4e-4 + rows * cols * 0.01;
}

/** Below this many ones the kernel is not worth its memory. */
const KERNEL_FROM_ONES = 2000;

/** Rank by sparse pre-elimination, then packed elimination of what is left; assumes nothing of the matrix. */
export function eliminationRank(H: SparseMatrix): number {
  const { pivots, core } = peel(H);
  const upright = core.cols <= core.rows ? core : transpose(core);
  return pivots + (core.colIndex.length < KERNEL_FROM_ONES ? insertionRank(upright) : fourRussiansRank(upright));
}

/** Rows reduced together, so that each basis row is fetched once for all of them. */
const BATCH = 32;

/** Rank by inserting rows, a batch at a time, into an echelon basis; the plain way, and the twin of the WebAssembly
 *  kernel. */
export function insertionRank(H: SparseMatrix): number {
  const stride = (H.cols + 31) >>> 5;
  const most = Math.min(H.rows, H.cols);
  const bytes = 4 * stride * most;
  if (bytes > PACKED_LIMIT_BYTES) throw new LimitError('rank over GF(2)', bytes, PACKED_LIMIT_BYTES, 'bytes');
  const basis = new EchelonBasis(most, H.cols);
  const batch = new Int32Array(BATCH * stride);
  for (let r = 0; r < H.rows && basis.size < most; r += BATCH) {
    const count = Math.min(BATCH, H.rows - r);
    batch.fill(0);
    for (let i = 0; i < count; i++) {
      for (let e = H.rowStart[r + i]!; e < H.rowStart[r + i + 1]!; e++) {
        const c = H.colIndex[e]!;
        batch[i * stride + (c >>> 5)]! ^= 1 << (c & 31);
      }
    }
    basis.insert(batch, count);
  }
  return basis.size;
}

/** Vectors with distinct leading columns; `order` names them by ascending leading column. */
class EchelonBasis {
  size = 0;
  private readonly stride: number;
  private readonly words: Int32Array;
  private readonly pivotRow: Int32Array;

  constructor(
    most: number,
    private readonly cols: number,
  ) {
    this.stride = (cols + 31) >>> 5;
    this.words = new Int32Array(most * this.stride);
    this.pivotRow = new Int32Array(cols).fill(-1);
  }

  insert(batch: Int32Array, count: number): void {
    const { stride, pivotRow } = this;
    for (let c = 0; c < this.cols; c++) {
      const word = c >>> 5;
      const bit = c & 31;
      for (let i = 0; i < count; i++) {
        if (((batch[i * stride + word]! >>> bit) & 1) === 0) continue;
        const p = pivotRow[c]!;
        if (p >= 0) addWords(batch, i * stride, this.words, p * stride, word, stride);
        else {
          pivotRow[c] = this.size;
          this.words.set(batch.subarray(i * stride, (i + 1) * stride), this.size++ * stride);
          batch.fill(0, i * stride, (i + 1) * stride);
        }
      }
    }
  }
}

function addWords(target: Int32Array, t: number, source: Int32Array, s: number, from: number, to: number): void {
  for (let w = from; w < to; w++) target[t + w]! ^= source[s + w]!;
}
