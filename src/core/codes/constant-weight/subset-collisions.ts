import { binomial, subsetRanking } from '../../designs/subset-rank.ts';

/** Largest table of marks, 64 MiB. */
const MAX_MARKS = 2 ** 29;
/** Largest list of subset numbers that is sorted where the table would be too large. */
const MAX_SORTED = 2e7;

export interface CollisionSearch {
  /** Least size of which no subset lies in two words, when `complete`; else the first size not tried. */
  size: number;
  complete: boolean;
  /** Largest size of which a subset was seen in two words. */
  repeated: number;
}

/** Tries subset sizes from 1 up while all subsets of the words together cost no more than `budget`. */
export function firstCollisionFreeSize(
  { n, w, M, ones }: { n: number; w: number; M: number; ones: Uint32Array },
  budget: number,
): CollisionSearch {
  let spent = 0;
  for (let size = 1; size <= w; size++) {
    const subsets = M * binomial(w, size);
    const numbers = binomial(n, size);
    spent += subsets;
    const fits = numbers <= MAX_MARKS || (subsets <= MAX_SORTED && numbers <= Number.MAX_SAFE_INTEGER);
    if (spent > budget || !fits) return { size, complete: false, repeated: size - 1 };
    if (!hasCollision({ n, w, M, ones }, size, numbers, subsets)) return { size, complete: true, repeated: size - 1 };
  }
  // Two words are the same.
  return { size: w + 1, complete: true, repeated: w };
}

function hasCollision(
  { n, w, M, ones }: { n: number; w: number; M: number; ones: Uint32Array },
  size: number,
  numbers: number,
  subsets: number,
): boolean {
  const visit = subsetNumbers(n, w, size);
  if (numbers <= MAX_MARKS) {
    const marks = new Uint32Array((numbers + 31) >>> 5);
    const mark = (number: number) => {
      const bit = 1 << (number & 31);
      if (marks[number >>> 5]! & bit) return true;
      marks[number >>> 5]! |= bit;
      return false;
    };
    for (let i = 0; i < M; i++) if (visit(ones, i * w, mark)) return true;
    return false;
  }
  const list = new Float64Array(subsets);
  let at = 0;
  const note = (number: number) => {
    list[at++] = number;
    return false;
  };
  for (let i = 0; i < M; i++) visit(ones, i * w, note);
  list.sort();
  for (let i = 1; i < list.length; i++) if (list[i] === list[i - 1]) return true;
  return false;
}

/** Numbers each subset of `size` of the w positions from `from` on as Σ C(p_i, i), its place in the combinatorial number
 *  system; stops when `visit` says so. */
function subsetNumbers(n: number, w: number, size: number) {
  const { terms } = subsetRanking(n, size);
  const walk = (
    ones: Uint32Array,
    from: number,
    at: number,
    left: number,
    sum: number,
    visit: (number: number) => boolean,
  ): boolean => {
    if (left === 0) return visit(sum);
    for (let j = at; j >= left - 1; j--) {
      if (walk(ones, from, j - 1, left - 1, sum + terms[left - 1]![ones[from + j]!]!, visit)) return true;
    }
    return false;
  };
  return (ones: Uint32Array, from: number, visit: (number: number) => boolean) =>
    walk(ones, from, w - 1, size, 0, visit);
}
