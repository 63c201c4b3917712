import type { Citation } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { type ConstantWeightCode, wordOf } from './constant-weight-code.ts';

const KAUTZ_SINGLETON: Citation = {
  authors: 'W. H. Kautz, R. C. Singleton',
  year: 1964,
  title: 'Nonrandom binary superimposed codes',
  where: 'IEEE Trans. Inf. Theory 10, 363–377',
};

/** Steps of the search for few words that cover another: some seconds. */
const COVER_STEPS = 5e7;

/** The largest d such that the ones of no word lie within those of d others. With positions as tests and words as items, up
 *  to d positive items are told from the tests alone.
 *
 *  Words share at most w − distance/2 ones with another, so at least ⌊(w − 1)/(w − distance/2)⌋ are needed to leave none
 *  over (Kautz and Singleton 1964). The value is exact when that many plus one do cover some word, or when the search over
 *  all words ends. d never passes M − 1, all that there are. */
export function disjunctness(code: ConstantWeightCode, steps = COVER_STEPS): Graded<Enclosure> {
  const { w, M, distance, distanceEvidence } = code;
  if (M < 2 || w === 0)
    return { value: { lower: 0, upper: 0 }, grade: 'computed', method: 'fewer than two words with ones' };
  const shared = w - distance / 2;
  const lower = distanceEvidence.grade === 'bounded' ? 0 : byIntersection(w, shared, M);
  const search = new CoverSearch(code, steps);
  const cover = search.fewest(lower + 1);
  const upper = cover === undefined ? M - 1 : cover.size - 1;
  if (cover?.size === lower + 1)
    return exact(lower, `Kautz–Singleton bound, met: ${lower + 1} words cover another`, KAUTZ_SINGLETON);
  if (!search.ended) {
    return {
      value: { lower, upper },
      grade: 'bounded',
      method: `from ⌊(w − 1)/${shared}⌋; search for covers ended at ${steps} steps`,
      source: KAUTZ_SINGLETON,
    };
  }
  return exact(
    upper,
    cover ? 'least number of words that cover another, over all words' : 'no word is covered by others',
  );
}

const byIntersection = (w: number, shared: number, M: number) =>
  Math.min(M - 1, shared === 0 ? M - 1 : Math.floor((w - 1) / shared));

function exact(d: number, method: string, source?: Citation): Graded<Enclosure> {
  return { value: { lower: d, upper: d }, grade: 'computed', method, source };
}

/** Looks for the fewest words whose ones together hold those of some other word, by depth-first search on the first one not
 *  yet held. */
class CoverSearch {
  ended = true;
  private best: number;
  private left: number;
  private readonly holders: number[][];

  constructor(
    private readonly code: ConstantWeightCode,
    steps: number,
  ) {
    this.left = steps;
    this.best = Math.min(code.w + 1, code.M);
    this.holders = Array.from({ length: code.n }, () => []);
    for (let i = 0; i < code.M; i++) for (const p of wordOf(code, i)) this.holders[p]!.push(i);
  }

  /** Stops at a cover of `enough` words, below which there is none. Undefined when no word is covered at all. */
  fewest(enough: number): { size: number } | undefined {
    const { M, w } = this.code;
    let found = false;
    for (let word = 0; word < M && this.ended && !(found && this.best <= enough); word++) {
      const ones = wordOf(this.code, word);
      if (this.search(word, ones, new Uint8Array(w), 0, enough)) found = true;
    }
    return found ? { size: this.best } : undefined;
  }

  /** Whether a cover smaller than the best known was found; `best` is then its size. */
  private search(word: number, ones: Uint32Array, held: Uint8Array, used: number, enough: number): boolean {
    const first = held.indexOf(0);
    if (first < 0) {
      this.best = used;
      return true;
    }
    if (used + 1 >= this.best) return false;
    let found = false;
    for (const other of this.mostFirst(word, ones, held, first)) {
      if (this.left <= 0) {
        this.ended = false;
        return found;
      }
      const next = held.slice();
      this.hold(other, ones, next);
      if (this.search(word, ones, next, used + 1, enough)) found = true;
      if (found && this.best <= enough) return true;
    }
    return found;
  }

  /** Other words on the first one left open, those that hold most of what is open first. */
  private mostFirst(word: number, ones: Uint32Array, held: Uint8Array, first: number): number[] {
    const gain = (other: number) => {
      const next = held.slice();
      return this.hold(other, ones, next);
    };
    const others = this.holders[ones[first]!]!.filter((other) => other !== word);
    return others
      .map((other) => ({ other, gain: gain(other) }))
      .sort((a, b) => b.gain - a.gain)
      .map(({ other }) => other);
  }

  /** Marks the ones that a word holds and says how many were open. */
  private hold(other: number, ones: Uint32Array, held: Uint8Array): number {
    const word = wordOf(this.code, other);
    let gained = 0;
    for (let i = 0, j = 0; i < ones.length && j < word.length; ) {
      if (ones[i] === word[j]) {
        if (held[i] === 0) gained++;
        held[i] = 1;
        i++;
        j++;
      } else if (ones[i]! < word[j]!) i++;
      else j++;
    }
    this.left -= word.length;
    return gained;
  }
}
