import { type Words, wordOf } from '../../src/core/codes/constant-weight/constant-weight-code.ts';
import { subsets } from './subset-coverage.ts';

/** Least number of places in which two words differ, bit by bit. */
export function plainDistance(code: Words): number {
  const words = Array.from({ length: code.M }, (_, i) => bitsOf(code.n, wordOf(code, i)));
  let least = Number.POSITIVE_INFINITY;
  words.forEach((a, i) => {
    for (const b of words.slice(i + 1)) least = Math.min(least, a.filter((bit, p) => bit !== b[p]).length);
  });
  return least;
}

/** Largest d such that no word lies within the union of d others, by trying every set of d others. */
export function plainDisjunctness(code: Words): number {
  const words = Array.from({ length: code.M }, (_, i) => new Set(wordOf(code, i)));
  for (let d = 1; d < code.M; d++) {
    for (const [i, word] of words.entries()) {
      const others = words.filter((_, j) => j !== i);
      for (const some of subsets(others, d)) if ([...word].every((p) => some.some((o) => o.has(p)))) return d - 1;
    }
  }
  return code.M - 1;
}

/** Ones shared by a word and another moved s places on, most over the shifts. */
export function plainCorrelation(n: number, a: readonly number[], b: readonly number[], shifts: number[]): number {
  return Math.max(0, ...shifts.map((s) => a.filter((x) => b.some((y) => (y + s) % n === x)).length));
}

/** Every word of n bits with w ones, as positions, in lexicographic order. */
export function plainWords(n: number, w: number): number[][] {
  return subsets(
    Array.from({ length: n }, (_, p) => p),
    w,
  );
}

const bitsOf = (n: number, ones: ArrayLike<number>) => {
  const bits = new Array<number>(n).fill(0);
  for (const p of Array.from(ones)) bits[p] = 1;
  return bits;
};
