import { type BlockDesign, blockOf } from '../../designs/block-design.ts';
import { mapsBlocksOntoThemselves } from '../../designs/block-symmetry.ts';
import { ParamError } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';
import { upperBoundOn } from './optical-bound.ts';

/** Words for users of one channel who are not in step: a family of w-subsets of the integers modulo n such that a word
 *  and its own cyclic shifts, and a word and all shifts of another, share at most so many ones. */
export interface OpticalOrthogonalCode {
  n: number;
  w: number;
  /** Ones of each word, ascending. */
  words: number[][];
  /** Most ones that a word shares with a shift of itself by 1 … n − 1; 0 for a code without words. */
  autoCorrelation: Graded<number>;
  /** Most ones that a word shares with a shift, by 0 … n − 1, of another; 0 for fewer than two words. */
  crossCorrelation: Graded<number>;
  /** The larger of the two, at least 1: the λ of an (n, w, λ) code. */
  lambda: number;
  /** Most words that an (n, w, λ) code can have. */
  bound: Graded<number>;
  /** Orbits of a design's blocks that are shorter than n, which no code can use: such a word meets a shift of itself
   *  everywhere. */
  shortOrbits: number;
}

/** Counts all correlations of a family of words.
 *  @throws ParamError unless the words have one weight and distinct ones from 0 to n − 1. */
export function opticalOrthogonalCode(
  n: number,
  words: readonly ArrayLike<number>[],
  shortOrbits = 0,
): OpticalOrthogonalCode {
  if (!Number.isSafeInteger(n) || n < 2) throw new ParamError('n', n, 'a whole number of 2 or more');
  const w = words[0]?.length ?? 0;
  const lists = words.map((word, i) => {
    const list = Array.from(word).sort((a, b) => a - b);
    const distinct = new Set(list).size === w && list.length === w;
    if (w < 1 || !distinct || list.some((p) => !Number.isInteger(p) || p < 0 || p >= n))
      throw new ParamError(`words[${i}]`, word, `${w || 'some'} distinct ones from 0 to ${n - 1}`);
    return list;
  });
  const auto = Math.max(0, ...lists.map((word) => mostShared(n, word, word, true)));
  let cross = 0;
  lists.forEach((a, i) => {
    for (const b of lists.slice(i + 1)) cross = Math.max(cross, mostShared(n, a, b, false));
  });
  const counted = (value: number, method: string): Graded<number> => ({ value, grade: 'computed', method });
  const lambda = Math.max(1, auto, cross);
  return {
    n,
    w,
    words: lists,
    autoCorrelation: counted(auto, 'differences within each word counted'),
    crossCorrelation: counted(cross, 'differences between each two words counted'),
    lambda,
    bound: upperBoundOn(n, Math.max(1, w), lambda),
    shortOrbits,
  };
}

/** A shift by s lays a − b on s, so ones shared at a shift are pairs with that difference. */
function mostShared(n: number, a: readonly number[], b: readonly number[], withinOne: boolean): number {
  const shared = new Uint32Array(n);
  let most = 0;
  for (const x of a) {
    for (const y of b) {
      const shift = x >= y ? x - y : x - y + n;
      if (withinOne && shift === 0) continue;
      shared[shift]!++;
      if (shared[shift]! > most) most = shared[shift]!;
    }
  }
  return most;
}

/** One word from each orbit of n blocks under p → p + 1 (mod v). From a cyclic 2-(v, k, 1) design, that is from a
 *  difference family, comes a (v, k, 1) code that meets the bound (Chung, Salehi and Wei 1989, §III).
 *  @throws ParamError when the shift does not map the blocks onto themselves. */
export function opticalOrthogonalFromDesign(design: BlockDesign): OpticalOrthogonalCode {
  const { v, b } = design;
  const shift = Uint32Array.from({ length: v }, (_, p) => (p + 1 === v ? 0 : p + 1));
  if (!mapsBlocksOntoThemselves(design, shift))
    throw new ParamError('design', design.spec?.family ?? 'these blocks', 'a design on which p → p + 1 (mod v) acts');
  const seen = new Set<string>();
  const words: number[][] = [];
  let shortOrbits = 0;
  for (let i = 0; i < b; i++) {
    const least = leastShift(v, blockOf(design, i));
    if (seen.has(least.join())) continue;
    seen.add(least.join());
    if (mostShared(v, least, least, true) === least.length) shortOrbits++;
    else words.push(least);
  }
  return opticalOrthogonalCode(v, words, shortOrbits);
}

/** The lexicographically least of the shifts that put a point on 0. */
function leastShift(v: number, block: Uint32Array): number[] {
  const k = block.length;
  const gaps = Array.from(block, (p, i) => (block[(i + 1) % k]! - p + v) % v || v);
  let best = 0;
  for (let start = 1; start < k; start++) {
    for (let i = 0; i < k; i++) {
      const difference = gaps[(start + i) % k]! - gaps[(best + i) % k]!;
      if (difference < 0) best = start;
      if (difference !== 0) break;
    }
  }
  return Array.from({ length: k }, (_, i) => (block[(best + i) % k]! - block[best]! + v) % v);
}
