import { refuseBeyondLimits } from './matrix-limits.ts';

/** (row, column) pairs in any order. */
export interface Entries {
  readonly count: number;
  each(visit: (row: number, col: number) => void): void;
}

/** The first `count` pairs of two lists side by side. */
export const pairedEntries = (rowOf: ArrayLike<number>, colOf: ArrayLike<number>, count = rowOf.length): Entries => ({
  count,
  each(visit) {
    for (let e = 0; e < count; e++) visit(rowOf[e]!, colOf[e]!);
  },
});

const PAIRS = 1 << 18;

/** Pairs as they are read, kept in pieces, so that growing copies nothing and takes no memory ahead of the file. */
export class EntryList implements Entries {
  count = 0;
  largestRow = -1;
  largestCol = -1;
  hasZero = false;
  private readonly pieces: Uint32Array[] = [];

  /** @throws LimitError when there are more than a matrix may have. */
  push(row: number, col: number): void {
    const place = this.count % PAIRS;
    if (place === 0) {
      refuseBeyondLimits(0, 0, this.count);
      this.pieces.push(new Uint32Array(2 * PAIRS));
    }
    const piece = this.pieces[this.pieces.length - 1]!;
    piece[2 * place] = row;
    piece[2 * place + 1] = col;
    this.count++;
    if (row > this.largestRow) this.largestRow = row;
    if (col > this.largestCol) this.largestCol = col;
    if (row === 0 || col === 0) this.hasZero = true;
  }

  each(visit: (row: number, col: number) => void): void {
    for (let e = 0; e < this.count; e++) {
      const piece = this.pieces[Math.floor(e / PAIRS)]!;
      const place = 2 * (e % PAIRS);
      visit(piece[place]!, piece[place + 1]!);
    }
  }
}
