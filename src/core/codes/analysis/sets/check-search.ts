import { type SparseMatrix, transpose } from '../../sparse-matrix.ts';
import type { Orbits } from '../tanner-orbits.ts';

/** What a set of columns must do at every check: `stopping` meets none exactly once, `codeword` meets each an even number of
 *  times. */
export type CheckRule = 'stopping' | 'codeword';

export interface SetsOfSize {
  /** Sets met, up to the limit asked for; one or more of each orbit of the symmetry. */
  sets: Uint32Array[];
  /** Number of sets of this size in all; a fraction never, a bound from below when `finished` is false. */
  count: number;
  nodes: number;
  finished: boolean;
}

export interface SizeSearch {
  size: number;
  nodes: number;
  /** Sets kept. */
  keep?: number;
  onProgress?(share: number): void;
}

/** All sets of columns of one size that keep the rule, when none is smaller: by branch and bound. A broken check is broken by
 *  too few bits, so one of its other columns must come in: each is tried in turn and then shut out, so that every set is
 *  met once. Of sets equal under the symmetry only those through the first column of an orbit, and without earlier
 *  orbits, are looked for; their number is scaled by how often the set meets the orbit.
 *  A branch ends when more checks are broken than the columns still to come can meet. */
export class CheckSearch {
  private readonly T: SparseMatrix;
  private readonly degree: Int32Array;
  /** Columns of each check neither chosen nor shut out. */
  private readonly open: Int32Array;
  private readonly shut: Uint8Array;
  private readonly broken: Int32Array;
  private readonly place: Int32Array;
  private brokenCount = 0;
  private readonly chosen: number[] = [];
  private readonly heaviest: number;
  private nodesLeft = 0;
  private found: { sets: Uint32Array[]; count: number } = { sets: [], count: 0 };
  private orbit = 0;
  private keep = 0;

  constructor(
    private readonly H: SparseMatrix,
    private readonly orbits: Orbits,
    private readonly rule: CheckRule,
  ) {
    this.T = transpose(H);
    this.degree = new Int32Array(H.rows);
    this.open = new Int32Array(H.rows);
    this.shut = new Uint8Array(H.cols);
    this.broken = new Int32Array(H.rows);
    this.place = new Int32Array(H.rows).fill(-1);
    let heaviest = 0;
    for (let c = 0; c < H.cols; c++) heaviest = Math.max(heaviest, this.T.rowStart[c + 1]! - this.T.rowStart[c]!);
    this.heaviest = heaviest;
  }

  ofSize({ size, nodes, keep = 1000, onProgress }: SizeSearch): SetsOfSize {
    const { orbits, H } = this;
    this.shut.fill(0);
    this.degree.fill(0);
    this.place.fill(-1);
    this.brokenCount = 0;
    for (let r = 0; r < H.rows; r++) this.open[r] = H.rowStart[r + 1]! - H.rowStart[r]!;
    this.nodesLeft = nodes;
    this.found = { sets: [], count: 0 };
    this.keep = keep;
    const members = membersOf(orbits);
    for (let o = 0; o < orbits.representatives.length && this.nodesLeft > 0; o++) {
      this.orbit = o;
      const root = orbits.representatives[o]!;
      this.choose(root);
      this.descend(size - 1);
      this.unchoose(root);
      for (const c of members[o]!) this.shutOut(c);
      onProgress?.((o + 1) / orbits.representatives.length);
    }
    const { sets, count } = this.found;
    return { sets, count: Math.round(count), nodes: nodes - this.nodesLeft, finished: this.nodesLeft > 0 };
  }

  private descend(remaining: number): void {
    if (--this.nodesLeft <= 0) return;
    if (this.brokenCount === 0) {
      this.record();
      return;
    }
    if (remaining === 0 || this.brokenCount > remaining * this.heaviest) return;
    const check = this.tightest();
    if (this.open[check] === 0) return;
    const { rowStart, colIndex } = this.H;
    const tried: number[] = [];
    for (let e = rowStart[check]!; e < rowStart[check + 1]!; e++) {
      const c = colIndex[e]!;
      if (this.shut[c]) continue;
      if (remaining > 1 || this.mends(c)) {
        this.choose(c);
        this.descend(remaining - 1);
        this.unchoose(c);
      }
      this.shutOut(c);
      tried.push(c);
      if (this.nodesLeft <= 0) break;
    }
    for (const c of tried) this.readmit(c);
  }

  /** Whether the column alone mends every broken check and breaks none. */
  private mends(c: number): boolean {
    const { rowStart, colIndex } = this.T;
    let mended = 0;
    for (let e = rowStart[c]!; e < rowStart[c + 1]!; e++) {
      const degree = this.degree[colIndex[e]!]!;
      if (this.isBroken(degree)) mended++;
      else if (this.isBroken(degree + 1)) return false;
    }
    return mended === this.brokenCount;
  }

  private isBroken(degree: number): boolean {
    return this.rule === 'stopping' ? degree === 1 : (degree & 1) === 1;
  }

  /** The broken check with the fewest columns left. */
  private tightest(): number {
    let best = this.broken[0]!;
    for (let i = 1; i < this.brokenCount; i++) {
      if (this.open[this.broken[i]!]! < this.open[best]!) best = this.broken[i]!;
    }
    return best;
  }

  private record(): void {
    const inOrbit = this.chosen.filter((c) => this.orbits.orbitOf[c] === this.orbit).length;
    this.found.count += this.orbits.sizes[this.orbit]! / inOrbit;
    if (this.found.sets.length < this.keep) this.found.sets.push(Uint32Array.from(this.chosen).sort());
  }

  private choose(c: number): void {
    this.chosen.push(c);
    this.shut[c] = 1;
    this.step(c, 1, -1);
  }

  private unchoose(c: number): void {
    this.chosen.pop();
    this.shut[c] = 0;
    this.step(c, -1, 1);
  }

  private step(c: number, by: 1 | -1, openBy: 1 | -1): void {
    const { rowStart, colIndex } = this.T;
    for (let e = rowStart[c]!; e < rowStart[c + 1]!; e++) {
      const r = colIndex[e]!;
      const before = this.isBroken(this.degree[r]!);
      this.degree[r]! += by;
      this.open[r]! += openBy;
      const after = this.isBroken(this.degree[r]!);
      if (after && !before) {
        this.place[r] = this.brokenCount;
        this.broken[this.brokenCount++] = r;
      } else if (before && !after) {
        const last = this.broken[--this.brokenCount]!;
        this.broken[this.place[r]!] = last;
        this.place[last] = this.place[r]!;
        this.place[r] = -1;
      }
    }
  }

  private shutOut(c: number): void {
    if (this.shut[c]) return;
    this.shut[c] = 1;
    const { rowStart, colIndex } = this.T;
    for (let e = rowStart[c]!; e < rowStart[c + 1]!; e++) this.open[colIndex[e]!]!--;
  }

  private readmit(c: number): void {
    this.shut[c] = 0;
    const { rowStart, colIndex } = this.T;
    for (let e = rowStart[c]!; e < rowStart[c + 1]!; e++) this.open[colIndex[e]!]!++;
  }
}

function membersOf(orbits: Orbits): number[][] {
  const members = Array.from(orbits.representatives, (): number[] => []);
  orbits.orbitOf.forEach((o, c) => {
    members[o]!.push(c);
  });
  return members;
}
