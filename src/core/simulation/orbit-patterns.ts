import type { PermutationGroup } from './permutation-group.ts';

/** One pattern of each orbit of a group on the patterns of a weight, with the orbit's size. */
export interface OrbitPatterns {
  /** Number of branches the search is cut into, for doing part of it. */
  branches: number;
  /** Representatives in the branches from `from` up to, without, `to`, ascending; the array is used again. */
  walk(from: number, to: number): Generator<{ positions: Uint32Array; orbitSize: number }>;
}

/** Orderly generation (Read, Ann. Discrete Math. 2, 1978): of each orbit the pattern that is first in the order of
 *  sorted positions. The first positions of such a pattern are such a pattern themselves, so that a prefix which is not
 *  is left with all that follows. The orbit's size is the group's order over that of the pattern's stabiliser. */
export function orbitPatterns(group: PermutationGroup, weight: number): OrbitPatterns {
  const carriers = carriersToLeast(group);
  const pattern = new Uint32Array(weight);
  const compared = imageComparison(group);

  /** Order of the stabiliser of the first `size` positions, or 0 when an element carries them to an earlier pattern. */
  const stabiliser = (size: number): number => {
    if (size === 0) return group.order;
    const least = pattern[0]!;
    let fixing = 0;
    for (let i = 0; i < size; i++) {
      const point = pattern[i]!;
      if (carriers.least[point]! !== least) {
        if (carriers.least[point]! < least) return 0;
        continue;
      }
      for (const g of carriers.elements(point)) {
        const order = compared(g, pattern, size);
        if (order > 0) return 0;
        if (order === 0) fixing += 1;
      }
    }
    return fixing;
  };

  function* extend(size: number): Generator<number> {
    if (size === weight) {
      yield group.order / stabiliser(size);
      return;
    }
    const from = size === 0 ? 0 : pattern[size - 1]! + 1;
    for (let point = from; point <= group.n - (weight - size); point++) {
      pattern[size] = point;
      if (stabiliser(size + 1) > 0) yield* extend(size + 1);
    }
  }

  const prefixes = listPrefixes(group, weight, pattern, stabiliser);
  return {
    branches: prefixes.length,
    *walk(from, to) {
      for (const prefix of prefixes.slice(from, to)) {
        pattern.set(prefix);
        for (const orbitSize of extend(prefix.length)) yield { positions: pattern, orbitSize };
      }
    },
  };
}

/** First positions, up to two, of the representatives: the branches. */
function listPrefixes(
  group: PermutationGroup,
  weight: number,
  pattern: Uint32Array,
  stabiliser: (size: number) => number,
): number[][] {
  if (weight === 0) return [[]];
  const prefixes: number[][] = [];
  for (let a = 0; a <= group.n - weight; a++) {
    pattern[0] = a;
    if (stabiliser(1) === 0) continue;
    if (weight === 1) prefixes.push([a]);
    else
      for (let b = a + 1; b <= group.n - weight + 1; b++) {
        pattern[1] = b;
        if (stabiliser(2) > 0) prefixes.push([a, b]);
      }
  }
  return prefixes;
}

/** The least point of each point's orbit, and the elements that carry the point there. */
function carriersToLeast(group: PermutationGroup) {
  const { n, order } = group;
  const least = new Uint32Array(n).fill(n);
  for (let point = 0; point < n; point++) {
    if (least[point]! < n) continue;
    for (let g = 0; g < order; g++) least[group.apply(g, point)] = point;
  }
  const kept: (Uint32Array | undefined)[] = [];
  return {
    least,
    elements(point: number): Uint32Array {
      const known = kept[point];
      if (known) return known;
      const carrying: number[] = [];
      for (let g = 0; g < order; g++) if (group.apply(g, point) === least[point]) carrying.push(g);
      const packed = Uint32Array.from(carrying);
      kept[point] = packed;
      return packed;
    },
  };
}

/** How a pattern compares with its image under an element g: above 0 when g carries it to an earlier pattern, below 0 to
 *  a later one, 0 to itself. The earlier of two sets is the one that holds the least position in which they differ. */
function imageComparison(group: PermutationGroup): (g: number, pattern: Uint32Array, size: number) => number {
  const mark = new Uint32Array(group.n);
  let stamp = 0;
  return (g, pattern, size) => {
    stamp += 2;
    for (let i = 0; i < size; i++) mark[pattern[i]!] = stamp;
    let leastNew = group.n;
    for (let i = 0; i < size; i++) {
      const point = group.apply(g, pattern[i]!);
      if (mark[point] === stamp) mark[point] = stamp + 1;
      else leastNew = Math.min(leastNew, point);
    }
    if (leastNew === group.n) return 0;
    for (let i = 0; i < size; i++) if (mark[pattern[i]!] === stamp) return pattern[i]! - leastNew;
    return 0;
  };
}
