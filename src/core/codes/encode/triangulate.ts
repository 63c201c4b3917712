import type { SeededRandom } from '../../algebra/seeded-random.ts';
import { rowOf, type SparseMatrix, transpose } from '../sparse-matrix.ts';

/** Rows in an order in which each has one position that no earlier one and no position outside the triangle has. */
export interface Triangle {
  rows: Uint32Array;
  /** Position that each row of the triangle gives, in order. */
  pivots: Uint32Array;
  /** Rows whose positions were all given by others. */
  gapRows: Uint32Array;
  /** Positions that no row of the triangle gives, ascending: information, and as many more as there are gap rows. */
  outside: Uint32Array;
}

/** Greedily, as erasures are decoded (Richardson and Urbanke 2001, §III): a row with one position open gives it; where none
 *  has, the row with fewest open gives the one on fewest rows and its others are put outside. Ties fall to the first row,
 *  or at random. The gap is not least in general, which would be hard to find. */
export function triangulate(H: SparseMatrix, random?: SeededRandom): Triangle {
  const T = transpose(H);
  const open = Int32Array.from({ length: H.rows }, (_, r) => rowOf(H, r).length);
  const queue = new OpenRows(open, random);
  const known = new Uint8Array(H.cols);
  const rows: number[] = [];
  const pivots: number[] = [];
  const gapRows: number[] = [];
  const makeKnown = (c: number) => {
    known[c] = 1;
    for (const r of rowOf(T, c)) queue.lower(r);
  };
  for (let r = queue.take(); r >= 0; r = queue.take()) {
    const left = Array.from(rowOf(H, r)).filter((c) => !known[c]);
    if (left.length === 0) {
      gapRows.push(r);
      continue;
    }
    const degree = (c: number) => T.rowStart[c + 1]! - T.rowStart[c]!;
    const pivot = left.reduce((best, c) => (degree(c) < degree(best) ? c : best));
    rows.push(r);
    pivots.push(pivot);
    for (const c of left) makeKnown(c);
  }
  const isPivot = new Uint8Array(H.cols);
  for (const c of pivots) isPivot[c] = 1;
  return {
    rows: Uint32Array.from(rows),
    pivots: Uint32Array.from(pivots),
    gapRows: Uint32Array.from(gapRows),
    outside: Uint32Array.from({ length: H.cols }, (_, c) => c).filter((c) => !isPivot[c]),
  };
}

/** Rows by how many of their positions are open, fewest first. */
class OpenRows {
  private readonly taken: Uint8Array;
  private readonly buckets: number[][] = [];

  constructor(
    private readonly open: Int32Array,
    random?: SeededRandom,
  ) {
    this.taken = new Uint8Array(open.length);
    const order = Uint32Array.from({ length: open.length }, (_, i) => open.length - 1 - i);
    for (const r of random ? random.shuffle(order) : order) this.put(r);
  }

  private put(r: number): void {
    const degree = this.open[r]!;
    while (this.buckets.length <= degree) this.buckets.push([]);
    this.buckets[degree]!.push(r);
  }

  lower(r: number): void {
    this.open[r]!--;
    if (!this.taken[r]) this.put(r);
  }

  /** A row with fewest open, or −1; a row stands in the bucket of every degree it has had, and counts in the last. */
  take(): number {
    for (let degree = 0; degree < this.buckets.length; degree++) {
      const bucket = this.buckets[degree]!;
      for (let r = bucket.pop(); r !== undefined; r = bucket.pop()) {
        if (this.taken[r] || this.open[r] !== degree) continue;
        this.taken[r] = 1;
        return r;
      }
    }
    return -1;
  }
}
