import { seededRandom } from '../../algebra/seeded-random.ts';
import { affineOnCopiesWithInfinity, affineOnTwoCopies, affineWithInfinity } from './groups.ts';
import { quadruplesUnderGroup } from './prescribed-group.ts';

/** Which group each base order is sought under, and the index of its multipliers; found by trial, once. */
const BASE: Record<number, (v: number) => Uint32Array[]> = {
  10: () => affineWithInfinity(9, 1),
  14: () => affineOnTwoCopies(7, 2, false),
  22: () => affineOnTwoCopies(11, 10, true),
  26: () => affineOnTwoCopies(13, 1, true),
  34: () => affineOnTwoCopies(17, 1, true),
  38: () => affineWithInfinity(37, 4),
  46: () => affineOnTwoCopies(23, 2, false),
  50: () => affineOnTwoCopies(25, 1, true),
  58: () => affineOnTwoCopies(29, 1, true),
  62: () => affineWithInfinity(61, 4),
  70: () => affineOnCopiesWithInfinity(23, 3, 2),
  74: () => affineOnTwoCopies(37, 1, true),
  82: () => affineWithInfinity(81, 1),
  86: () => affineOnTwoCopies(43, 2, false),
  94: () => affineOnTwoCopies(47, 2, false),
  98: () => affineOnTwoCopies(49, 1, true),
};

/** Nodes the search of a base order may take; each is known to need far fewer. */
const MAX_NODES = 100_000;

/** Whether quadrupleSystem(v) is built here. */
export function quadruplesAreBuilt(v: number): boolean {
  return v === 2 || v === 4 || v in BASE || (v % 2 === 0 && quadruplesAreBuilt(v / 2));
}

/** A Steiner quadruple system on v points: by doubling (Hanani 1960) down to v = 4 or to a base order, which is a
 *  union of orbits of a prescribed group (Kramer and Mesner 1976). Null where neither reaches v. */
export function quadrupleSystem(v: number): number[][] | null {
  if (v === 2) return [];
  if (v === 4) return [[0, 1, 2, 3]];
  const group = BASE[v];
  if (group) return quadruplesUnderGroup(v, group(v), seededRandom('1'), MAX_NODES);
  const half = v % 2 === 0 && quadruplesAreBuilt(v / 2) ? quadrupleSystem(v / 2) : null;
  return half && doubled(v / 2, half);
}

/** SQS(2u) from SQS(u): the system on both copies, and for each one-factor Fᵢ of the complete graph on u points the
 *  quadruples {x, y, z′, w′} with xy and zw in Fᵢ. From the Boolean system this gives the Boolean system again, up to
 *  isomorphism, when the factors are those of the group. Source: H. Hanani, Canad. J. Math. 12 (1960) 145–157. */
function doubled(u: number, system: readonly number[][]): number[][] {
  const copies = system.flatMap((q) => [q, q.map((x) => x + u)]);
  const across = oneFactors(u).flatMap((factor) =>
    factor.flatMap(([x, y]) => factor.map(([z, w]) => [x, y, z + u, w + u])),
  );
  return [...copies, ...across];
}

/** The u − 1 one-factors of the complete graph on u points; x ⊕ y when u is a power of 2, else pairs of sum 2i
 *  modulo u − 1 with ∞ = u − 1 (Kirkman's circle). */
function oneFactors(u: number): [number, number][][] {
  if (Number.isInteger(Math.log2(u))) {
    return Array.from({ length: u - 1 }, (_, i) => pairsWith(u, (x) => x ^ (i + 1)));
  }
  const n = u - 1;
  return Array.from({ length: n }, (_, i) =>
    pairsWith(u, (x) => (x === n ? i : x === i ? n : (2 * i - x + 2 * n) % n)),
  );
}

function pairsWith(u: number, partner: (x: number) => number): [number, number][] {
  const pairs: [number, number][] = [];
  for (let x = 0; x < u; x++) if (partner(x) > x) pairs.push([x, partner(x)]);
  return pairs;
}
