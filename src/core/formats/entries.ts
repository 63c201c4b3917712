import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';

/** (row, column) pairs in any order, which can be gone through as often as wanted. */
export interface Entries {
  each(visit: (row: number, col: number) => void): void;
}

const PIECE = 1 << 18;
/** Bytes that one pair takes at most: two differences of up to 21 bits and a sign. */
const LONGEST_PAIR = 8;

interface Piece {
  bytes: Uint8Array;
  used: number;
}

/** Pairs as they are read, each as its differences from the one before, seven bits a byte: two to six bytes a pair. They are
 *  kept in pieces, so that growing copies nothing and takes no memory ahead of the file. */
export class EntryList implements Entries {
  count = 0;
  largestRow = -1;
  largestCol = -1;
  hasZero = false;
  private readonly pieces: Piece[] = [];
  private piece: Piece = { bytes: new Uint8Array(0), used: 0 };
  private row = 0;
  private col = 0;

  /** Indices may count from 1. @throws LimitError on more pairs than a matrix may have, or on an index beyond its rows or
   *  columns. */
  push(row: number, col: number): void {
    if (row > matrixLimits.rows || col > matrixLimits.cols) refuseBeyondLimits(row, col, 0);
    if (this.piece.used + LONGEST_PAIR > this.piece.bytes.length) {
      refuseBeyondLimits(0, 0, this.count);
      this.piece = { bytes: new Uint8Array(PIECE), used: 0 };
      this.pieces.push(this.piece);
    }
    keep(this.piece, row - this.row);
    keep(this.piece, col - this.col);
    this.row = row;
    this.col = col;
    this.count++;
    if (row > this.largestRow) this.largestRow = row;
    if (col > this.largestCol) this.largestCol = col;
    if (row === 0 || col === 0) this.hasZero = true;
  }

  each(visit: (row: number, col: number) => void): void {
    let row = 0;
    let col = 0;
    for (const { bytes, used } of this.pieces) {
      for (let at = 0; at < used; ) {
        let coded = 0;
        let shift = 0;
        for (; bytes[at]! >= 128; shift += 7) coded |= (bytes[at++]! & 127) << shift;
        coded |= bytes[at++]! << shift;
        row += (coded >>> 1) ^ -(coded & 1);
        coded = 0;
        shift = 0;
        for (; bytes[at]! >= 128; shift += 7) coded |= (bytes[at++]! & 127) << shift;
        coded |= bytes[at++]! << shift;
        col += (coded >>> 1) ^ -(coded & 1);
        visit(row, col);
      }
    }
  }
}

/** The sign goes into the lowest bit, so that small steps either way take one byte. */
function keep(piece: Piece, difference: number): void {
  let coded = (difference << 1) ^ (difference >> 31);
  for (; coded >= 128; coded >>>= 7) piece.bytes[piece.used++] = (coded & 127) | 128;
  piece.bytes[piece.used++] = coded;
}
