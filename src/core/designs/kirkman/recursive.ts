import { primePowerOf } from '../../algebra/integers.ts';
import { affineTriples } from '../triple-systems/algebraic.ts';
import { kirkmanThreeTimes, kirkmanTwicePlusOne, type ResolvedTriples } from './direct.ts';

/** A Kirkman triple system on v ≡ 3 (mod 6) points, or null where none of these constructions reaches v:
 *  powers of 3; 3q and 2q + 1 for prime powers q ≡ 1 (mod 6); tripling; closure over blocks of sizes 4 and 7. */
export function kirkmanTriples(v: number): ResolvedTriples | null {
  if (v === 3) return [[[0, 1, 2]]];
  if (primePowerOf(v)?.p === 3) return affineClasses(v);
  if (isOneModSix(v / 3)) return kirkmanThreeTimes(v / 3);
  if (isOneModSix((v - 1) / 2)) return kirkmanTwicePlusOne((v - 1) / 2);
  const third = v % 9 === 0 ? kirkmanTriples(v / 3) : null;
  if (third) return tripled(v / 3, third);
  const blocks = pairwiseBalanced((v - 1) / 2);
  return blocks && closedOver((v - 1) / 2, blocks);
}

const isOneModSix = (q: number) => q % 6 === 1 && primePowerOf(q) !== null;

function affineClasses(v: number): ResolvedTriples {
  const { triples, classes } = affineTriples(v);
  const resolved: ResolvedTriples = Array.from({ length: (v - 1) / 2 }, () => []);
  classes.forEach((c, i) => {
    resolved[c]!.push([...triples.slice(3 * i, 3 * i + 3)]);
  });
  return resolved;
}

/** KTS(3u) for odd u: the system on each of three copies, and the transversal triples (x, x + y, x + 2y), whose
 *  classes have a fixed y. For u prime to 2 the three coordinates x, x + y, x + 2y are orthogonal in pairs when also
 *  each pair determines x and y, which for the first and last needs 2 to be a unit. */
function tripled(u: number, system: ResolvedTriples): ResolvedTriples {
  const copies = system.map((triples) => [0, 1, 2].flatMap((j) => triples.map((t) => t.map((p) => p + j * u))));
  const numbers = Array.from({ length: u }, (_, i) => i);
  const across = numbers.map((y) => numbers.map((x) => [x, u + ((x + y) % u), 2 * u + ((x + 2 * y) % u)]));
  return [...copies, ...across];
}

/** Blocks of sizes 4 and 7 with every pair of r points in one: AG(2,4) on 16; on 34, AG(3,3) with the translates of
 *  {0, e₁, e₂, e₃} and, for the 7 directions they do not use, a further point on each line of one direction. */
function pairwiseBalanced(r: number): number[][] | null {
  if (r === 16) return affinePlaneOfOrderFour();
  return r === 34 ? affineSpaceWithSevenPoints() : null;
}

function affinePlaneOfOrderFour(): number[][] {
  const product = [0, 1, 2, 3].map((a) => [0, 1, 2, 3].map((b) => (a && b ? ((a + b - 2) % 3) + 1 : 0)));
  const lines: number[][] = [0, 1, 2, 3].map((x) => [0, 1, 2, 3].map((y) => 4 * x + y));
  for (let slope = 0; slope < 4; slope++) {
    for (let c = 0; c < 4; c++) lines.push([0, 1, 2, 3].map((x) => 4 * x + (product[slope]![x]! ^ c)));
  }
  return lines;
}

function affineSpaceWithSevenPoints(): number[][] {
  const { triples, classes } = affineTriples(27);
  const sum = (x: number, y: number) =>
    [1, 3, 9].reduce((s, p) => s + ((Math.floor(x / p) + Math.floor(y / p)) % 3) * p, 0);
  const directionOf = new Map<number, number>();
  classes.forEach((c, i) => {
    const line = triples.subarray(3 * i, 3 * i + 3);
    if (line[0] === 0) for (const x of line.subarray(1)) directionOf.set(x, c);
  });
  const simplex = [0, 1, 3, 9];
  const opposite = (x: number) => sum(x, x);
  const used = new Set(
    simplex.flatMap((x) => simplex.filter((y) => y !== x).map((y) => directionOf.get(sum(x, opposite(y)))!)),
  );
  const blocks = Array.from({ length: 27 }, (_, s) => simplex.map((x) => sum(x, s)));
  const free = [...new Set(classes)].filter((c) => !used.has(c));
  classes.forEach((c, i) => {
    const extra = free.indexOf(c);
    if (extra >= 0) blocks.push([...triples.slice(3 * i, 3 * i + 3), 27 + extra]);
  });
  return [...blocks, Array.from({ length: free.length }, (_, i) => 27 + i)];
}

/** KTS(2r + 1) from blocks on r points with a KTS(2k + 1) for each block size k: points x, x′ and ∞; on a block the
 *  small system in which x and x′ lie with ∞, and the class of x is that of x in every block through it.
 *  Source: Ray-Chaudhuri and Wilson 1971, closure of the set of r with a KTS(2r + 1). */
function closedOver(r: number, blocks: readonly number[][]): ResolvedTriples {
  const infinity = 2 * r;
  const classes: ResolvedTriples = Array.from({ length: r }, (_, x) => [[infinity, x, r + x]]);
  for (const block of blocks) {
    const small = kirkmanTriples(2 * block.length + 1)!;
    const last = 2 * block.length;
    // The small system's point `last` plays ∞; its class i pairs two points there, which become x and x′.
    const name = new Map<number, number>([[last, infinity]]);
    small.forEach((triples, i) => {
      const [a, b] = triples.find((t) => t.includes(last))!.filter((p) => p !== last) as [number, number];
      name.set(a, block[i]!).set(b, r + block[i]!);
    });
    small.forEach((triples, i) => {
      for (const t of triples) if (!t.includes(last)) classes[block[i]!]!.push(t.map((p) => name.get(p)!));
    });
  }
  return classes;
}
