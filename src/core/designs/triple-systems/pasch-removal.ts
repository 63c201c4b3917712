import type { SeededRandom } from '../../algebra/seeded-random.ts';

export interface PaschRemoval {
  triples: Uint32Array;
  /** Pasch configurations left; 0 when the search reached its aim. */
  pasches: number;
  /** Moves tried, of the budget given. */
  moves: number;
}

/** Chance of taking a move that adds one Pasch, in 2^32nds: it falls from this to nothing, again and again. */
const HOTTEST = 0.35 * 2 ** 32;
const MOVES_A_COOLING = 15_000;

/** Descends on the number of Pasch configurations by cycle switching: where the triples on a and b, seen as edges on
 *  the other points, form a cycle, exchanging a and b along that one cycle gives another triple system. A Pasch is
 *  such a cycle of length four. Moves start at a triple of some Pasch. Nothing is promised: the result says how many
 *  are left. Cycle switching: Kaski, Mäenpää, Östergård, Math. Comp. 80 (2011); existence without any Pasch for every
 *  admissible v but 7 and 13: Grannell, Griggs, Whitehead, J. Combin. Des. 8 (2000) 300–309. */
export function removePasches(v: number, start: Uint32Array, random: SeededRandom, maxMoves: number): PaschRemoval {
  const system = new SwitchableSystem(v, start);
  let moves = 0;
  for (; moves < maxMoves && system.pasches > 0; moves++) {
    const [a, p] = system.pointsOfSomePasch(random);
    const b = random.below(v);
    if (b === a || b === p || system.third[a * v + p] === b) continue;
    const before = system.pasches;
    const cycle = system.cycleThrough(a, b, p);
    if (cycle.length === 0) continue;
    system.exchange(a, b, cycle);
    const worse = system.pasches - before;
    const uphill = HOTTEST * (1 - (moves % MOVES_A_COOLING) / MOVES_A_COOLING);
    if (worse > 1 || (worse === 1 && random.next32() > uphill)) system.exchange(b, a, cycle);
  }
  return { triples: system.triples(), pasches: system.pasches, moves };
}

/** A triple system under cycle switches, its Pasches counted as triples come and go. */
class SwitchableSystem {
  readonly third: Uint16Array;
  pasches = 0;

  constructor(
    readonly v: number,
    triples: Uint32Array,
  ) {
    this.third = new Uint16Array(v * v).fill(v);
    for (let e = 0; e < triples.length; e += 3) this.insert(triples[e]!, triples[e + 1]!, triples[e + 2]!);
  }

  /** A point a and a further point p of a triple {a, p, ·} that lies in a Pasch. */
  pointsOfSomePasch(random: SeededRandom): [number, number] {
    const { v, third } = this;
    for (;;) {
      const a = random.below(v);
      const p = random.below(v);
      const q = third[a * v + p]!;
      if (p !== a && q !== v && this.paschesThrough(a, p, q) > 0) return [a, p];
    }
  }

  /** Vertices p = c₀, c₁, … of the cycle that alternates {a, c₀, c₁}, {b, c₁, c₂}, …; empty when it passes through
   *  every triple on a and b but their common one, for then switching only renames a and b. */
  cycleThrough(a: number, b: number, p: number): number[] {
    const { v, third } = this;
    const cycle: number[] = [];
    for (let at = p, turn = 0; ; turn ^= 1) {
      cycle.push(at);
      at = third[(turn === 0 ? a : b) * v + at]!;
      if (at === p) break;
      if (cycle.length > LONGEST_CYCLE) return [];
    }
    return cycle.length >= v - 3 ? [] : cycle;
  }

  /** Gives a's triples along the cycle to b and b's to a; a's start at the first vertex. */
  exchange(a: number, b: number, cycle: readonly number[]): void {
    const n = cycle.length;
    for (let i = 0; i < n; i++) this.remove(i % 2 === 0 ? a : b, cycle[i]!, cycle[(i + 1) % n]!);
    for (let i = 0; i < n; i++) this.insert(i % 2 === 0 ? b : a, cycle[i]!, cycle[(i + 1) % n]!);
  }

  triples(): Uint32Array {
    const list: number[] = [];
    for (let x = 0; x < this.v; x++) {
      for (let y = x + 1; y < this.v; y++) {
        const z = this.third[x * this.v + y]!;
        if (z > y && z < this.v) list.push(x, y, z);
      }
    }
    return Uint32Array.from(list);
  }

  private insert(x: number, y: number, z: number): void {
    this.set(x, y, z, z, y, x);
    this.pasches += this.paschesThrough(x, y, z);
  }

  private remove(x: number, y: number, z: number): void {
    this.pasches -= this.paschesThrough(x, y, z);
    this.set(x, y, z, this.v, this.v, this.v);
  }

  private set(x: number, y: number, z: number, xy: number, xz: number, yz: number): void {
    const { v, third } = this;
    third[x * v + y] = third[y * v + x] = xy;
    third[x * v + z] = third[z * v + x] = xz;
    third[y * v + z] = third[z * v + y] = yz;
  }

  /** Pasches through one triple: each has exactly one other triple on x. */
  private paschesThrough(x: number, y: number, z: number): number {
    const { v, third } = this;
    let found = 0;
    for (let p = 0; p < v; p++) {
      const q = third[x * v + p]!;
      if (p === x || q === v || p === y || p === z) continue;
      const s = third[y * v + p]!;
      if (s !== v && s === third[z * v + q]) found++;
    }
    return found;
  }
}

const LONGEST_CYCLE = 60;
