import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { LimitError } from '../errors.ts';

/** Most that one packed matrix may take. */
export const PACKED_LIMIT_BYTES = 2 ** 29;

/** A dense matrix over GF(2), 32 columns a word: column c of row r is bit c & 31 of words[r·stride + (c >>> 5)]. */
export class BitMatrix {
  readonly words: Uint32Array;
  /** Words a row. */
  readonly stride: number;

  /** @throws LimitError when the packed matrix would pass PACKED_LIMIT_BYTES. */
  constructor(
    readonly rows: number,
    readonly cols: number,
  ) {
    this.stride = (cols + 31) >>> 5;
    const bytes = 4 * rows * this.stride;
    if (bytes > PACKED_LIMIT_BYTES) throw new LimitError('dense matrix over GF(2)', bytes, PACKED_LIMIT_BYTES, 'bytes');
    this.words = new Uint32Array(rows * this.stride);
  }

  get(r: number, c: number): 0 | 1 {
    return ((this.words[r * this.stride + (c >>> 5)]! >>> (c & 31)) & 1) as 0 | 1;
  }

  flip(r: number, c: number): void {
    this.words[r * this.stride + (c >>> 5)]! ^= 1 << (c & 31);
  }

  /** A view of row r's words. */
  row(r: number): Uint32Array {
    return this.words.subarray(r * this.stride, (r + 1) * this.stride);
  }

  /** Adds row `source` to row `target`, from word `fromWord` on. */
  addRow(target: number, source: number, fromWord = 0): void {
    const { words, stride } = this;
    const t = target * stride;
    const s = source * stride;
    for (let w = fromWord; w < stride; w++) words[t + w]! ^= words[s + w]!;
  }

  swapRows(a: number, b: number): void {
    if (a === b) return;
    const held = this.row(a).slice();
    this.row(a).set(this.row(b));
    this.row(b).set(held);
  }
}

export function packMatrix(H: SparseMatrix): BitMatrix {
  const packed = new BitMatrix(H.rows, H.cols);
  for (let r = 0; r < H.rows; r++) {
    for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) packed.flip(r, H.colIndex[e]!);
  }
  return packed;
}

/** Ones in a 32-bit word. */
export function popcount32(word: number): number {
  let x = word - ((word >>> 1) & 0x55555555);
  x = (x & 0x33333333) + ((x >>> 2) & 0x33333333);
  return Math.imul((x + (x >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
