import { type GaloisField, galoisField, subfieldOf } from '../../algebra/galois-field.ts';
import { gaussianBinomial } from '../../algebra/integers.ts';
import type { BlockDesign } from '../block-design.ts';
import { cyclicShift } from './cyclic-design.ts';
import { type EchelonBasis, echelonBases } from './subspaces.ts';

/** GF(q)^dimension as the field with q^dimension elements: coordinate j counts multiples of x^j, sums cost one table
 *  look-up, and multiplying by the generator x is the Singer cycle. */
interface FieldSpace {
  K: GaloisField;
  /** The elements of GF(q) inside K. */
  scalars: number[];
}

function fieldSpace(q: number, dimension: number): FieldSpace {
  const K = galoisField(q ** dimension);
  return { K, scalars: subfieldOf(K, q) };
}

/** The element of K with these coordinates. */
function elementOf({ K, scalars }: FieldSpace, coordinates: Uint32Array): number {
  let sum = 0;
  for (let j = 0; j < coordinates.length; j++) {
    if (coordinates[j] !== 0) sum = K.add(sum, K.mul(scalars[coordinates[j]!]!, K.exp[j]!));
  }
  return sum;
}

/** All elements of the span, zero first. */
function spanOf(space: FieldSpace, rows: readonly Uint32Array[]): Uint32Array {
  const { K, scalars } = space;
  const span = new Uint32Array(scalars.length ** rows.length);
  let size = 1;
  for (const row of rows) {
    const element = elementOf(space, row);
    for (let s = 1; s < scalars.length; s++) {
      const multiple = K.mul(scalars[s]!, element);
      for (let i = 0; i < size; i++) span[s * size + i] = K.add(span[i]!, multiple);
    }
    size *= scalars.length;
  }
  return span;
}

/** The d-flats of PG(m,q) in Singer order: point i is the point of x^i, and flats come orbit by orbit under the Singer
 *  cycle, each orbit's flats in the order of the cycle; so the incidence matrix is a column of circulants, but for short
 *  orbits. Every orbit has a flat through point 0, and its least such one stands for it.
 *  Source: Singer 1938; Hirschfeld, Projective Geometries over Finite Fields, ch. 4. */
export function projectiveFlats(m: number, q: number, d: number): BlockDesign {
  const space = fieldSpace(q, m + 1);
  const v = (q ** (m + 1) - 1) / (q - 1);
  const one = Uint32Array.from({ length: m + 1 }, (_, j) => (j === 0 ? 1 : 0));
  const points = (basis: EchelonBasis) => {
    const above = spanOf(space, basis.rows);
    const block = new Uint32Array((above.length * q - 1) / (q - 1));
    let size = 0;
    // Points through x^0: itself, and for each line direction outside it one coset of the multiples of x^0.
    for (const w of normalised(space, basis))
      for (const s of space.scalars) block[size++] = space.K.log[space.K.add(w, s)]! % v;
    block[size] = space.K.log[elementOf(space, one)]!;
    return block.sort();
  };
  return developOrbits(v, gaussianBinomial(m + 1, d + 1, q), through(echelonBases(q, d, 1, m), points));
}

/** One vector for each point of the span: leading coordinate one. */
function normalised(space: FieldSpace, basis: EchelonBasis): Uint32Array {
  const { K } = space;
  const count = (space.scalars.length ** basis.rows.length - 1) / (space.scalars.length - 1);
  const vectors = new Uint32Array(count);
  let size = 0;
  for (let i = basis.rows.length - 1; i >= 0; i--) {
    const lead = elementOf(space, basis.rows[i]!);
    for (const w of spanOf(space, basis.rows.slice(i + 1))) vectors[size++] = K.add(lead, w);
  }
  return vectors;
}

function* through(
  bases: Generator<EchelonBasis>,
  points: (basis: EchelonBasis) => Uint32Array,
): Generator<Uint32Array> {
  for (const basis of bases) yield points(basis);
}

/** The d-flats of AG(m,q) that miss the origin, on the q^m − 1 other points; point i is x^i. Flats come in orbits of
 *  multiplication by x, all of them full. Source: Kou, Lin, Fossorier 2001, sections III and VI. */
export function flatsMissingOrigin(m: number, q: number, d: number): BlockDesign {
  const space = fieldSpace(q, m);
  const v = q ** m - 1;
  const b = gaussianBinomial(m, d, q) * (q ** (m - d) - 1);
  function* flats(): Generator<Uint32Array> {
    for (const { rows } of echelonBases(q, d, 0, m - 1)) {
      const holdsOne = rows[0]!.every((c, j) => c === (j === 0 ? 1 : 0));
      if (!holdsOne)
        yield spanOf(space, rows)
          .map((w) => space.K.log[space.K.add(w, 1)]!)
          .sort();
    }
  }
  return developOrbits(v, b, flats());
}

/** The d-flats of AG(m,q): point i is x^i, the last point is the origin. Flats come by parallel class, a class being the
 *  translates of one subspace. */
export function affineFlats(m: number, q: number, d: number): BlockDesign {
  const space = fieldSpace(q, m);
  const { K } = space;
  const [v, k, translates] = [q ** m, q ** d, q ** (m - d)];
  const b = gaussianBinomial(m, d, q) * translates;
  const blockPoints = new Uint32Array(b * k);
  const classes = new Uint32Array(b);
  const pointOf = (element: number) => (element === 0 ? v - 1 : K.log[element]!);
  let i = 0;
  for (const { pivots, rows } of echelonBases(q, d, 0, m - 1)) {
    const span = spanOf(space, rows);
    const parallelClass = i / translates;
    for (const shift of complementOf(space, pivots, m)) {
      const block = blockPoints.subarray(i * k, (i + 1) * k);
      for (let e = 0; e < k; e++) block[e] = pointOf(K.add(span[e]!, shift));
      block.sort();
      classes[i++] = parallelClass;
    }
  }
  const blockStart = Uint32Array.from({ length: b + 1 }, (_, j) => j * k);
  const scale = Uint32Array.from({ length: v }, (_, x) => (x === v - 1 ? x : (x + 1) % (v - 1)));
  const translate = Uint32Array.from({ length: v }, (_, x) => pointOf(K.add(x === v - 1 ? 0 : K.exp[x]!, 1)));
  const symmetry = [
    { order: v - 1, pointPerm: scale },
    { order: K.p, pointPerm: translate },
  ];
  return { v, b, blockStart, blockPoints, classes, symmetry };
}

/** One element of each coset of the subspace: combinations of the coordinates that are no pivots. */
function complementOf(space: FieldSpace, pivots: readonly number[], m: number): Uint32Array {
  const free = Array.from({ length: m }, (_, j) => j).filter((j) => !pivots.includes(j));
  return spanOf(
    space,
    free.map((j) => Uint32Array.from({ length: m }, (_, i) => (i === j ? 1 : 0))),
  );
}

/** Develops modulo v the blocks through point 0 that stand for their orbit: of the k translates of a block that have a
 *  point at 0, the one whose gaps between neighbouring points come first in dictionary order. */
function developOrbits(v: number, b: number, throughZero: Iterable<Uint32Array>): BlockDesign {
  let blockPoints = new Uint32Array(0);
  let k = 0;
  let block = 0;
  for (const base of throughZero) {
    if (block === 0) {
      k = base.length;
      blockPoints = new Uint32Array(b * k);
    }
    const period = leastRotationPeriod(gapsOf(base, v));
    if (period === 0) continue;
    // A block that maps to itself after `period` of its k points has an orbit of v·period/k blocks.
    for (let shift = 0; shift < (v * period) / k; shift++) {
      if (block === b) throw new Error(`more than ${b} flats found`);
      writeTranslate(blockPoints.subarray(block * k, (block + 1) * k), base, shift, v);
      block++;
    }
  }
  if (block !== b) throw new Error(`${b} flats expected, ${block} found`);
  const blockStart = Uint32Array.from({ length: b + 1 }, (_, j) => j * k);
  return { v, b, blockStart, blockPoints, symmetry: [{ order: v, pointPerm: cyclicShift(v) }] };
}

function gapsOf(block: Uint32Array, v: number): Uint32Array {
  const k = block.length;
  return Uint32Array.from({ length: k }, (_, i) => (i + 1 < k ? block[i + 1]! : block[0]! + v) - block[i]!);
}

/** The period of the cyclic sequence when no rotation of it comes before it in dictionary order; 0 when one does. */
function leastRotationPeriod(gaps: Uint32Array): number {
  const k = gaps.length;
  for (let turn = 1; turn < k; turn++) {
    let i = 0;
    while (i < k && gaps[i] === gaps[(i + turn) % k]) i++;
    if (i === k) return turn;
    if (gaps[(i + turn) % k]! < gaps[i]!) return 0;
  }
  return k;
}

/** base + shift modulo v, ascending without a sort. */
function writeTranslate(target: Uint32Array, base: Uint32Array, shift: number, v: number): void {
  const k = base.length;
  let wrapped = 0;
  while (wrapped < k && base[k - 1 - wrapped]! + shift >= v) wrapped++;
  for (let i = 0; i < k; i++) {
    target[i] = i < wrapped ? base[k - wrapped + i]! + shift - v : base[i - wrapped]! + shift;
  }
}
