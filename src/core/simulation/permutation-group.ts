import { ParamError } from '../errors.ts';

/** A group of permutations of 0 … n−1, its elements numbered from 0 to order − 1. */
export interface PermutationGroup {
  n: number;
  order: number;
  /** The image of a point under element g. */
  apply(g: number, point: number): number;
}

/** Entries that a table of all elements may hold. */
const tableLimit = 2 ** 25;

export function trivialGroup(n: number): PermutationGroup {
  return { n, order: 1, apply: (_, point) => point };
}

/** The group that the generators generate, as a table of its elements where that fits; otherwise only the cyclic group
 *  of the first generator, which is smaller but needs no table.
 *  @throws ParamError when a generator is not a permutation of 0 … n−1. */
export function permutationGroup(n: number, generators: readonly Uint32Array[]): PermutationGroup {
  for (const generator of generators) refuseNoPermutation(n, generator);
  const [first] = generators;
  if (!first) return trivialGroup(n);
  return closure(n, generators) ?? cyclicGroup(first);
}

function refuseNoPermutation(n: number, generator: Uint32Array): void {
  const seen = new Uint8Array(n);
  for (const image of generator) if (image < n) seen[image] = 1;
  if (generator.length !== n || seen.includes(0))
    throw new ParamError('symmetry', `${generator.length} images`, `a permutation of 0 to ${n - 1}`);
}

/** All products of generators, breadth first; null when they pass the limit. */
function closure(n: number, generators: readonly Uint32Array[]): PermutationGroup | null {
  const identity = Uint32Array.from({ length: n }, (_, i) => i);
  const elements = [identity];
  const known = new Set([keyOf(identity)]);
  for (let at = 0; at < elements.length; at++) {
    for (const generator of generators) {
      const product = elements[at]!.map((image) => generator[image]!);
      const key = keyOf(product);
      if (known.has(key)) continue;
      if ((elements.length + 1) * n > tableLimit) return null;
      known.add(key);
      elements.push(product);
    }
  }
  return { n, order: elements.length, apply: (g, point) => elements[g]![point]! };
}

const keyOf = (permutation: Uint32Array) => permutation.join();

/** Powers of one permutation, by its cycles: element g moves each point g places along its cycle. */
function cyclicGroup(generator: Uint32Array): PermutationGroup {
  const n = generator.length;
  const cycleOf: Uint32Array[] = Array.from({ length: n });
  const placeOf = new Uint32Array(n);
  let order = 1;
  for (let start = 0; start < n; start++) {
    if (cycleOf[start]) continue;
    const cycle: number[] = [];
    for (let at = start; cycle.length === 0 || at !== start; at = generator[at]!) cycle.push(at);
    const packed = Uint32Array.from(cycle);
    cycle.forEach((point, place) => {
      cycleOf[point] = packed;
      placeOf[point] = place;
    });
    order = lcm(order, cycle.length);
  }
  return {
    n,
    order,
    apply(g, point) {
      const cycle = cycleOf[point]!;
      return cycle[(placeOf[point]! + g) % cycle.length]!;
    },
  };
}

function lcm(a: number, b: number): number {
  let [x, y] = [a, b];
  while (y > 0) [x, y] = [y, x % y];
  return (a / x) * b;
}
