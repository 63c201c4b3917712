import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { LimitError } from '../errors.ts';
import {
  type RankKernel,
  ROW_ALIGNMENT,
  rankKernel,
  STRIP_COLUMNS,
  TABLE_ENTRIES,
  TABLES,
} from '../kernels/rank-kernel.ts';
import { PACKED_LIMIT_BYTES } from './bit-matrix.ts';

/** Rank by the method of four Russians in WebAssembly, the whole matrix packed in its memory.
 *  @throws LimitError when the packed matrix does not fit. */
export function fourRussiansRank(H: SparseMatrix): number {
  const rowBytes = ROW_ALIGNMENT * Math.ceil(H.cols / (8 * ROW_ALIGNMENT));
  const bytes = H.rows * rowBytes;
  if (bytes > PACKED_LIMIT_BYTES) throw new LimitError('rank over GF(2)', bytes, PACKED_LIMIT_BYTES, 'bytes');
  return new Elimination(H, rowBytes).rank();
}

class Elimination {
  private readonly kernel: RankKernel;
  private readonly words: Int32Array;
  /** Addresses: the matrix lies at 0, then one word a row, then the tables. */
  private readonly windows: number;
  private readonly tables: number;
  private readonly pivotWindows = new Int32Array(STRIP_COLUMNS);
  private readonly pivotBits = new Int32Array(STRIP_COLUMNS);

  constructor(
    private readonly H: SparseMatrix,
    private readonly rowBytes: number,
  ) {
    this.windows = H.rows * rowBytes;
    this.tables = ROW_ALIGNMENT * Math.ceil((this.windows + 4 * H.rows) / ROW_ALIGNMENT);
    const end = this.tables + TABLES * TABLE_ENTRIES * rowBytes;
    this.kernel = rankKernel(Math.ceil(end / 65536));
    this.words = new Int32Array(this.kernel.memory.buffer);
    const rowWords = rowBytes / 4;
    for (let r = 0; r < H.rows; r++) {
      for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) {
        const c = H.colIndex[e]!;
        this.words[r * rowWords + (c >>> 5)]! ^= 1 << (c & 31);
      }
    }
  }

  rank(): number {
    const { rows, cols } = this.H;
    let rank = 0;
    for (let strip = 0; strip * STRIP_COLUMNS < cols && rank < rows; strip++) {
      const found = this.findPivots(strip, rank);
      if (found > 0 && rank + found < rows) this.clearBelow(strip, rank, found);
      rank += found;
      if (found === 0 && !this.anyOneBelow(rank)) break;
    }
    return rank;
  }

  /** Brings up to 32 pivot rows of the strip to rows rank, rank + 1, …; among themselves they are reduced. */
  private findPivots(strip: number, rank: number): number {
    const { words, kernel, pivotWindows, pivotBits, rowBytes } = this;
    const rowWords = rowBytes / 4;
    const from = stripStart(strip);
    let found = 0;
    for (let i = rank; i < this.H.rows && found < STRIP_COLUMNS; i++) {
      const original = words[i * rowWords + strip]!;
      let window = original;
      for (let p = 0; p < found; p++) if ((original >>> pivotBits[p]!) & 1) window ^= pivotWindows[p]!;
      if (window === 0) continue;
      const target = rank + found;
      for (let p = 0; p < found; p++) {
        if ((original >>> pivotBits[p]!) & 1) kernel.addRow(i * rowBytes, (rank + p) * rowBytes, from, rowBytes);
      }
      if (i !== target) kernel.swapRows(i * rowBytes, target * rowBytes, from, rowBytes);
      const bit = 31 - Math.clz32(window & -window);
      for (let p = 0; p < found; p++) {
        if (((pivotWindows[p]! >>> bit) & 1) === 0) continue;
        kernel.addRow((rank + p) * rowBytes, target * rowBytes, from, rowBytes);
        pivotWindows[p]! ^= window;
      }
      pivotWindows[found] = window;
      pivotBits[found++] = bit;
    }
    return found;
  }

  /** Clears the pivots' columns of the strip in all rows below. */
  private clearBelow(strip: number, rank: number, found: number): void {
    const { words, kernel, rowBytes, windows } = this;
    const { rows } = this.H;
    const first = rank + found;
    const from = stripStart(strip);
    let pivotMask = 0;
    for (let p = 0; p < found; p++) pivotMask |= 1 << this.pivotBits[p]!;
    for (let i = first; i < rows; i++) words[windows / 4 + i] = words[(i * rowBytes) / 4 + strip]! & pivotMask;
    this.buildTables(rank, found, from);
    kernel.applyTables(first * rowBytes, rows * rowBytes, rowBytes, windows + 4 * first, this.tables, from);
  }

  /** Entry e of table t is the sum of the pivot rows whose bits e holds. A bit without a pivot adds nothing, and no row
   *  asks for it. */
  private buildTables(rank: number, found: number, from: number): void {
    const { kernel, tables, rowBytes, words, pivotBits } = this;
    const bits = STRIP_COLUMNS / TABLES;
    const rowOfBit = new Int32Array(STRIP_COLUMNS).fill(-1);
    for (let p = 0; p < found; p++) rowOfBit[pivotBits[p]!] = rank + p;
    for (let t = 0; t < TABLES; t++) {
      const table = tables + t * TABLE_ENTRIES * rowBytes;
      words.fill(0, table / 4, (table + rowBytes) / 4);
      for (let b = 0; b < bits; b++) {
        const row = rowOfBit[t * bits + b]!;
        // Entry 0 is a row of zeros.
        kernel.doubleTable(table, rowBytes, 1 << b, row < 0 ? table : row * rowBytes, from);
      }
    }
  }

  private anyOneBelow(rank: number): boolean {
    const { words } = this;
    const end = this.windows / 4;
    for (let w = (rank * this.rowBytes) / 4; w < end; w++) if (words[w] !== 0) return true;
    return false;
  }
}

/** The aligned byte at or before which the strip begins. */
function stripStart(strip: number): number {
  const byte = (strip * STRIP_COLUMNS) / 8;
  return byte - (byte % ROW_ALIGNMENT);
}
