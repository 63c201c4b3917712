import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { LimitError } from '../errors.ts';
import {
  MATRIX_AT,
  PANEL_BYTES,
  PIVOT_ROWS_AT,
  type RankKernel,
  STRIP_COLUMNS,
  withRankKernel,
} from '../kernels/rank-kernel.ts';
import { PACKED_LIMIT_BYTES } from './bit-matrix.ts';

/** Words of a row in one panel. */
const PANEL_WORDS = PANEL_BYTES / 4;
const PANEL_COLUMNS = 8 * PANEL_BYTES;
/** Both are powers of two, so that packing divides by shifts. */
const PANEL_SHIFT = Math.log2(PANEL_COLUMNS);

/** Rank by the method of four Russians in WebAssembly, the whole matrix packed in its memory.
 *  @throws LimitError when the packed matrix does not fit. */
export function fourRussiansRank(H: SparseMatrix): number {
  const bytes = H.rows * PANEL_BYTES * Math.ceil(H.cols / PANEL_COLUMNS);
  if (bytes > PACKED_LIMIT_BYTES) throw new LimitError('rank over GF(2)', bytes, PACKED_LIMIT_BYTES, 'bytes');
  return withRankKernel(MATRIX_AT + bytes, (kernel) => {
    pack(H, new Int32Array(kernel.memory.buffer, MATRIX_AT, bytes / 4));
    return new Elimination(H.rows, H.cols, kernel).rank();
  });
}

/** Panel by panel, in each the pieces of all rows. */
function pack({ rows, rowStart, colIndex }: SparseMatrix, words: Int32Array): void {
  const panelWords = rows * PANEL_WORDS;
  for (let r = 0; r < rows; r++) {
    const piece = r * PANEL_WORDS;
    for (let e = rowStart[r]!; e < rowStart[r + 1]!; e++) {
      const c = colIndex[e]!;
      const w = (c >>> PANEL_SHIFT) * panelWords + piece + ((c >>> 5) & (PANEL_WORDS - 1));
      words[w]! ^= 1 << (c & 31);
    }
  }
}

class Elimination {
  private readonly words: Int32Array;
  private readonly panels: number;
  private readonly panelBytes: number;
  private readonly pivotWindows = new Int32Array(STRIP_COLUMNS);
  private readonly pivotBits = new Int32Array(STRIP_COLUMNS);

  constructor(
    private readonly rows: number,
    private readonly cols: number,
    private readonly kernel: RankKernel,
  ) {
    this.words = new Int32Array(kernel.memory.buffer);
    this.panels = Math.ceil(cols / PANEL_COLUMNS);
    this.panelBytes = rows * PANEL_BYTES;
  }

  rank(): number {
    const { rows, cols } = this;
    let rank = 0;
    for (let strip = 0; strip * STRIP_COLUMNS < cols && rank < rows; strip++) {
      const found = this.findPivots(strip, rank);
      if (found > 0 && rank + found < rows) this.clearBelow(strip, rank, found);
      rank += found;
      if (found === 0 && !this.anyOneBelow(strip, rank)) break;
    }
    return rank;
  }

  /** Address of row 0 in the strip's own panel; columns before it are done with. */
  private panelOf(strip: number): number {
    return MATRIX_AT + Math.floor(strip / PANEL_WORDS) * this.panelBytes;
  }

  /** Brings up to 32 pivot rows of the strip to rows rank, rank + 1, …; among themselves they are reduced. */
  private findPivots(strip: number, rank: number): number {
    const { words, kernel, pivotWindows, pivotBits, panelBytes, rows } = this;
    const panel = this.panelOf(strip);
    const windows = panel / 4 + (strip % PANEL_WORDS);
    const panels = this.panels - Math.floor(strip / PANEL_WORDS);
    const address = (row: number) => panel + row * PANEL_BYTES;
    let found = 0;
    for (let i = rank; i < rows && found < STRIP_COLUMNS; i++) {
      const original = words[windows + i * PANEL_WORDS]!;
      if (original === 0) continue;
      let window = original;
      for (let p = 0; p < found; p++) if ((original >>> pivotBits[p]!) & 1) window ^= pivotWindows[p]!;
      if (window === 0) continue;
      const target = address(rank + found);
      for (let p = 0; p < found; p++) {
        if ((original >>> pivotBits[p]!) & 1) kernel.addRow(address(i), address(rank + p), panels, panelBytes);
      }
      if (i !== rank + found) kernel.swapRows(address(i), target, panels, panelBytes);
      const bit = 31 - Math.clz32(window & -window);
      for (let p = 0; p < found; p++) {
        if (((pivotWindows[p]! >>> bit) & 1) === 0) continue;
        kernel.addRow(address(rank + p), target, panels, panelBytes);
        pivotWindows[p]! ^= window;
      }
      pivotWindows[found] = window;
      pivotBits[found++] = bit;
    }
    return found;
  }

  /** Clears the pivots' columns of the strip in all rows below. The strip's own panel comes last, since it tells what to
   *  add in all of them. */
  private clearBelow(strip: number, rank: number, found: number): void {
    const { words, kernel, pivotBits, panelBytes, rows, panels } = this;
    const first = (rank + found) * PANEL_BYTES;
    const end = rows * PANEL_BYTES;
    const own = this.panelOf(strip);
    const windows = own + first + 4 * (strip % PANEL_WORDS);
    words.fill(-1, PIVOT_ROWS_AT / 4, PIVOT_ROWS_AT / 4 + STRIP_COLUMNS);
    let mask = 0;
    for (let p = 0; p < found; p++) {
      mask |= 1 << pivotBits[p]!;
      words[PIVOT_ROWS_AT / 4 + pivotBits[p]!] = (rank + p) * PANEL_BYTES;
    }
    for (let panel = MATRIX_AT + (panels - 1) * panelBytes; panel >= own; panel -= panelBytes) {
      kernel.buildTables(panel);
      kernel.applyTables(panel + first, panel + end, windows, mask);
    }
  }

  private anyOneBelow(strip: number, rank: number): boolean {
    const { words, rows, panels, panelBytes } = this;
    for (let panel = this.panelOf(strip); panel < MATRIX_AT + panels * panelBytes; panel += panelBytes) {
      const end = (panel + rows * PANEL_BYTES) / 4;
      for (let w = (panel + rank * PANEL_BYTES) / 4; w < end; w++) if (words[w] !== 0) return true;
    }
    return false;
  }
}
