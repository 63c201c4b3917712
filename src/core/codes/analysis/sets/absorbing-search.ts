import { rowOf, type SparseMatrix, transpose } from '../../sparse-matrix.ts';
import type { Orbits } from '../tanner-orbits.ts';
import type { AbsorbingBudget, AbsorbingClass } from './absorbing-sets.ts';

/** One depth of the search: the sets of exactly `largest` bits, each met once. */
export class AbsorbingSearch {
  spent = 0;
  private readonly T: SparseMatrix;
  private readonly degree: Int32Array;
  /** Odd checks of each bit, kept for bits inside and outside. */
  private readonly odd: Int32Array;
  private readonly shut: Uint8Array;
  private readonly chosen: number[] = [];
  private oddChecks = 0;
  private orbit = 0;
  private readonly classes = new Map<number, AbsorbingClass>();

  constructor(
    private readonly H: SparseMatrix,
    private readonly orbits: Orbits,
    private readonly budget: AbsorbingBudget,
  ) {
    this.T = transpose(H);
    this.degree = new Int32Array(H.rows);
    this.odd = new Int32Array(H.cols);
    this.shut = new Uint8Array(H.cols);
  }

  get finished(): boolean {
    return this.spent < this.budget.nodes;
  }

  /** The sets of exactly `largest` bits. */
  run(): AbsorbingClass[] {
    const { orbits } = this;
    for (let o = 0; o < orbits.representatives.length && this.finished; o++) {
      this.orbit = o;
      const root = orbits.representatives[o]!;
      this.choose(root);
      this.descend(this.budget.largest - 1);
      this.unchoose(root);
      orbits.orbitOf.forEach((of, c) => {
        if (of === o) this.shut[c] = 1;
      });
    }
    return [...this.classes.values()];
  }

  private descend(remaining: number): void {
    if (++this.spent >= this.budget.nodes) return;
    const bit = this.worst();
    if (remaining === 0) {
      if (this.excess(bit) <= 0) this.record();
      return;
    }
    const { oddChecks: mostOdd = Number.POSITIVE_INFINITY } = this.budget;
    if (this.oddChecks - 5 * remaining > mostOdd) return;
    const tried: number[] = [];
    for (const c of this.excess(bit) > 0 ? this.menders(bit) : this.neighbours()) {
      if (this.shut[c]) continue;
      this.choose(c);
      this.descend(remaining - 1);
      this.unchoose(c);
      this.shut[c] = 1;
      tried.push(c);
      if (!this.finished) break;
    }
    for (const c of tried) this.shut[c] = 0;
  }

  /** Odd checks beyond those the bit may have: fewer than half of its checks may be odd. */
  private excess(c: number): number {
    const weight = this.T.rowStart[c + 1]! - this.T.rowStart[c]!;
    return this.odd[c]! - Math.floor((weight - 1) / 2);
  }

  private worst(): number {
    let worst = this.chosen[0]!;
    for (const c of this.chosen) if (this.excess(c) > this.excess(worst)) worst = c;
    return worst;
  }

  /** Columns on t + 1 odd checks of a bit that may keep t of them: one of them belongs to every set that completes this one,
   *  since some of these checks must be met again. */
  private menders(bit: number): number[] {
    const checks = Array.from(rowOf(this.T, bit)).filter((r) => this.degree[r]! % 2 === 1);
    const kept = this.odd[bit]! - this.excess(bit);
    const open = (r: number) => rowOf(this.H, r).reduce((sum, c) => sum + (this.shut[c] ? 0 : 1), 0);
    const ranked = checks.map((r) => [open(r), r] as const).sort((x, y) => x[0] - y[0]);
    return ranked.slice(0, kept + 1).flatMap(([, r]) => Array.from(rowOf(this.H, r)));
  }

  /** Columns that share a check with the set. */
  private neighbours(): number[] {
    return this.chosen.flatMap((c) => Array.from(rowOf(this.T, c), (r) => Array.from(rowOf(this.H, r))).flat());
  }

  private record(): void {
    const { oddChecks: mostOdd = Number.POSITIVE_INFINITY, keep = 1000 } = this.budget;
    const b = this.oddChecks;
    if (b > mostOdd) return;
    const a = this.chosen.length;
    let found = this.classes.get(b);
    if (!found) {
      found = { a, b, count: 0, fullyAbsorbing: 0, sets: [] };
      this.classes.set(b, found);
    }
    const inOrbit = this.chosen.filter((c) => this.orbits.orbitOf[c] === this.orbit).length;
    const images = this.orbits.sizes[this.orbit]! / inOrbit;
    found.count = tidy(found.count + images);
    if (this.isFull()) found.fullyAbsorbing = tidy(found.fullyAbsorbing + images);
    if (found.sets.length < keep) found.sets.push(Uint32Array.from(this.chosen).sort());
  }

  private isFull(): boolean {
    for (const c of this.chosen) {
      for (const r of rowOf(this.T, c)) {
        if (this.degree[r]! % 2 === 1) for (const d of rowOf(this.H, r)) if (this.excess(d) > 0) return false;
      }
    }
    return true;
  }

  private choose(c: number): void {
    this.chosen.push(c);
    this.shut[c] = 1;
    this.step(c, 1);
  }

  private unchoose(c: number): void {
    this.chosen.pop();
    this.shut[c] = 0;
    this.step(c, -1);
  }

  private step(c: number, by: 1 | -1): void {
    const { T, H, degree, odd } = this;
    for (let e = T.rowStart[c]!; e < T.rowStart[c + 1]!; e++) {
      const r = T.colIndex[e]!;
      degree[r]! += by;
      const change = degree[r]! % 2 === 1 ? 1 : -1;
      this.oddChecks += change;
      for (let f = H.rowStart[r]!; f < H.rowStart[r + 1]!; f++) odd[H.colIndex[f]!]! += change;
    }
  }
}

/** Counts are sums of fractions size/meetings; whole in the end, so thirds are not let drift. */
const tidy = (x: number) => Math.round(x * 720_720) / 720_720;
