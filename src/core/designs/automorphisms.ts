import { LimitError } from '../errors.ts';
import { type BlockDesign, blockOf } from './block-design.ts';

export const MAX_AUTOMORPHISM_POINTS = 64;

/** Search nodes before giving up; designs with little structure need few, most symmetric ones find images at once. */
const MAX_NODES = 2_000_000;

export interface AutomorphismGroup {
  order: bigint;
  /** Permutations of the points that generate the group. */
  generators: Uint32Array[];
  /** Points fixed one after another until nothing but the identity is left, with the size of each orbit. */
  base: { point: number; orbitSize: number }[];
}

/** The group of all permutations of the points that map the blocks onto themselves, by a chain of stabilisers: with
 *  the first points of the base fixed, the orbit of the next is found by seeking, for each candidate image, one
 *  automorphism that takes it there. Candidates are cut by partition refinement with individualisation: colours of
 *  points and blocks are split by the colours they meet until stable (McKay 1981 is the model; no canonical form here).
 *  @throws LimitError above 64 points, or when the budget of nodes is spent. */
export function automorphismGroup(design: BlockDesign): AutomorphismGroup {
  if (design.v > MAX_AUTOMORPHISM_POINTS) {
    throw new LimitError('automorphism group', design.v, MAX_AUTOMORPHISM_POINTS, 'points');
  }
  const search = new ImageSearch(design);
  const { base, colourings } = search.chooseBase();
  const generators: Uint32Array[] = [];
  const sizes: number[] = [];
  // From the deepest stabiliser outwards, so that what was found fixes the outer points and joins orbits there.
  for (let level = base.length - 1; level >= 0; level--) {
    const point = base[level]!;
    const orbits = new Orbits(design.v);
    for (const g of generators) orbits.join(g);
    const colour = colourings[level]!;
    const refused = new Set<number>();
    for (let image = 0; image < design.v; image++) {
      if (colour[image] !== colour[point] || orbits.same(image, point) || refused.has(orbits.root(image))) continue;
      const found = search.extend(base, colourings, level, image);
      if (found) {
        generators.push(found);
        orbits.join(found);
      } else refused.add(orbits.root(image));
    }
    sizes[level] = orbits.sizeOf(point);
  }
  return {
    order: sizes.reduce((product, size) => product * BigInt(size), 1n),
    generators,
    base: base.map((point, i) => ({ point, orbitSize: sizes[i]! })),
  };
}

/** Colours of points, equal for points not told apart; names of colours do not depend on names of points. */
type Colouring = Int32Array;

class ImageSearch {
  private readonly blocksOn: number[][];
  private readonly blocks: Uint32Array[];
  private readonly blockNames: Set<string>;
  private nodes = 0;

  constructor(private readonly design: BlockDesign) {
    this.blocks = Array.from({ length: design.b }, (_, i) => blockOf(design, i));
    this.blocksOn = Array.from({ length: design.v }, () => []);
    this.blocks.forEach((block, i) => {
      for (const p of block) this.blocksOn[p]!.push(i);
    });
    this.blockNames = new Set(this.blocks.map((block) => [...block].sort((a, b) => a - b).join()));
  }

  /** Fixes the first point of the largest colour class until every point has its own colour. colourings[i] is the
   *  stable colouring with the first i points of the base fixed. */
  chooseBase(): { base: number[]; colourings: Colouring[] } {
    const base: number[] = [];
    const colourings = [this.refine(new Int32Array(this.design.v))];
    for (let point = this.nextPoint(colourings[0]!); point >= 0; point = this.nextPoint(colourings.at(-1)!)) {
      base.push(point);
      colourings.push(this.fix(colourings.at(-1)!, point));
    }
    return { base, colourings };
  }

  /** An automorphism that fixes the base before `level` and takes its point there to `image`, or null. */
  extend(base: number[], colourings: Colouring[], level: number, image: number): Uint32Array | null {
    const start = colourings[level]!;
    return this.descend(base, colourings, level, this.fix(start, image));
  }

  private descend(base: number[], colourings: Colouring[], level: number, mirrored: Colouring): Uint32Array | null {
    if (++this.nodes > MAX_NODES) throw new LimitError('automorphism search', this.nodes, MAX_NODES, 'nodes');
    const expected = colourings[level + 1]!;
    if (!sameProfile(expected, mirrored)) return null;
    if (level + 1 === base.length) return this.mapping(expected, mirrored);
    const colour = expected[base[level + 1]!]!;
    for (let image = 0; image < this.design.v; image++) {
      if (mirrored[image] !== colour) continue;
      const found = this.descend(base, colourings, level + 1, this.fix(mirrored, image));
      if (found) return found;
    }
    return null;
  }

  /** Both colourings are discrete: the map of equal colours, when it keeps the blocks. */
  private mapping(from: Colouring, to: Colouring): Uint32Array | null {
    const at = new Map<number, number>();
    to.forEach((c, p) => {
      at.set(c, p);
    });
    const perm = Uint32Array.from(from, (c) => at.get(c)!);
    const keeps = this.blocks.every((block) =>
      this.blockNames.has(
        Array.from(block, (p) => perm[p]!)
          .sort((a, b) => a - b)
          .join(),
      ),
    );
    return keeps ? perm : null;
  }

  private nextPoint(colour: Colouring): number {
    const sizes = new Map<number, number>();
    for (const c of colour) sizes.set(c, (sizes.get(c) ?? 0) + 1);
    let best = -1;
    for (let p = 0; p < colour.length; p++) {
      const size = sizes.get(colour[p]!)!;
      if (size > 1 && (best < 0 || size > sizes.get(colour[best]!)!)) best = p;
    }
    return best;
  }

  private fix(colour: Colouring, point: number): Colouring {
    const next = colour.map((c) => 2 * c);
    next[point]!++;
    return this.refine(next);
  }

  /** Splits until stable; new colours are ranks of (old colour, sorted colours of the blocks on the point). */
  private refine(start: Colouring): Colouring {
    let colour = ranked(Array.from(start, (c) => String(c).padStart(6, '0')));
    for (;;) {
      const blockColour = ranked(
        this.blocks.map((block) =>
          Array.from(block, (p) => colour[p]!)
            .sort(ascending)
            .join(),
        ),
      );
      const next = ranked(
        this.blocksOn.map((on, p) => {
          const seen = on.map((i) => blockColour[i]!).sort(ascending);
          return `${String(colour[p]!).padStart(6, '0')}:${seen.join()}`;
        }),
      );
      if (classes(next) === classes(colour)) return next;
      colour = next;
    }
  }
}

const ascending = (a: number, b: number) => a - b;
const classes = (colour: Colouring) => new Set(colour).size;

/** Names replaced by their rank among the names that occur: isomorphic inputs get equal ranks. */
function ranked(names: readonly string[]): Colouring {
  const order = new Map([...new Set(names)].sort().map((name, i) => [name, i]));
  return Int32Array.from(names, (name) => order.get(name)!);
}

/** Equally many points of every colour. */
function sameProfile(a: Colouring, b: Colouring): boolean {
  const counts = new Int32Array(a.length);
  for (let p = 0; p < a.length; p++) {
    counts[a[p]!]!++;
    counts[b[p]!]!--;
  }
  return counts.every((c) => c === 0);
}

class Orbits {
  private readonly parent: Uint32Array;

  constructor(v: number) {
    this.parent = Uint32Array.from({ length: v }, (_, p) => p);
  }

  root(p: number): number {
    let top = p;
    while (this.parent[top] !== top) top = this.parent[top]!;
    return top;
  }

  same(p: number, q: number): boolean {
    return this.root(p) === this.root(q);
  }

  join(perm: Uint32Array): void {
    perm.forEach((image, p) => {
      const [a, b] = [this.root(p), this.root(image)];
      if (a !== b) this.parent[Math.max(a, b)] = Math.min(a, b);
    });
  }

  sizeOf(p: number): number {
    return this.parent.filter((_, q) => this.same(p, q)).length;
  }
}
