import { ParamError } from '../../errors.ts';
import { type Words, wordOf } from './constant-weight-code.ts';

/** Messages of a whole number of bits, each with its word. Words are numbered in lexicographic order of their positions of
 *  ones, ascending; the first 2^messageBits of them are used. */
export interface EnumerativeEncoder {
  n: number;
  w: number;
  /** Words that have a number. */
  count: bigint;
  /** ⌊log2 count⌋. */
  messageBits: number;
  /** Positions of the ones of the word with this number. @throws ParamError on a number out of range. */
  word(index: bigint): Uint32Array;
  /** Number of a word given by its ascending positions of ones; null when it is not a word of the code. */
  index(ones: ArrayLike<number>): bigint | null;
  /** The word of a message, one byte 0 or 1 a bit, most significant bit first. @throws ParamError on a wrong length. */
  encode(message: Uint8Array): Uint8Array;
  /** The message of a word; null for what is no word, and for a word whose number passes every message. */
  decode(word: Uint8Array): Uint8Array | null;
}

/** By a sorted table of the words.
 *  @throws ParamError on a code without words, or with a word twice. */
export function tableEncoder(code: Words): EnumerativeEncoder {
  const { n, w, M } = code;
  if (M < 1) throw new ParamError('words', M, 'at least one word');
  const order = lexicographicOrder(code);
  const compareTo = (ones: ArrayLike<number>, at: number) => compareWords(ones, wordOf(code, order[at]!));
  for (let i = 1; i < M; i++) {
    if (compareTo(wordOf(code, order[i - 1]!), i) === 0)
      throw new ParamError('words', `word ${order[i]} twice`, 'distinct words');
  }
  return withMessages({
    n,
    w,
    count: BigInt(M),
    word: (index) => wordOf(code, order[Number(index)]!).slice(),
    index(ones) {
      if (ones.length !== w) return null;
      let [from, to] = [0, M];
      while (from < to) {
        const middle = (from + to) >>> 1;
        const sign = compareTo(ones, middle);
        if (sign === 0) return BigInt(middle);
        if (sign < 0) to = middle;
        else from = middle + 1;
      }
      return null;
    },
  });
}

/** Places of the words in lexicographic order. */
export function lexicographicOrder(code: Words): Uint32Array {
  return Uint32Array.from({ length: code.M }, (_, i) => i).sort((a, b) =>
    compareWords(wordOf(code, a), wordOf(code, b)),
  );
}

function compareWords(a: ArrayLike<number>, b: ArrayLike<number>): number {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! < b[i]! ? -1 : 1;
  return 0;
}

/** All words of n bits with w ones, numbered without a table: a word is passed by those that agree with it up to some place
 *  and have their next one earlier, Σ C(n − 1 − p, w − 1 − i) over the positions p skipped before one i (Cover 1973,
 *  "Enumerative source encoding").
 *  @throws ParamError unless 0 ≤ w ≤ n ≤ 4096 are whole. */
export function coverEncoder(n: number, w: number): EnumerativeEncoder {
  if (!Number.isSafeInteger(n) || n < 1 || n > 4096) throw new ParamError('n', n, 'a whole number from 1 to 4096');
  if (!Number.isSafeInteger(w) || w < 0 || w > n) throw new ParamError('w', w, `a whole number from 0 to n = ${n}`);
  return withMessages({
    n,
    w,
    count: choose(n, w),
    word(index) {
      const ones = new Uint32Array(w);
      let rest = index;
      walk(n, w, (position, here, left) => {
        if (rest >= here) {
          rest -= here;
          return false;
        }
        ones[w - left] = position;
        return true;
      });
      return ones;
    },
    index(ones) {
      if (ones.length !== w) return null;
      for (let i = 0; i < w; i++) if (!(ones[i]! < n && (i === 0 || ones[i - 1]! < ones[i]!))) return null;
      let number = 0n;
      walk(n, w, (position, here, left) => {
        if (ones[w - left] === position) return true;
        number += here;
        return false;
      });
      return number;
    },
  });
}

/** Goes through the positions with the number of words that have their next one here, given those before; `take` says
 *  whether the word does. */
function walk(n: number, w: number, take: (position: number, here: bigint, left: number) => boolean): void {
  let left = w;
  // C(m, left) with m positions to come; both neighbours in Pascal's triangle are one product and one quotient away.
  let all = choose(n, w);
  for (let position = 0; left > 0; position++) {
    const m = BigInt(n - position);
    const here = (all * BigInt(left)) / m;
    if (take(position, here, left)) {
      all = here;
      left--;
    } else all -= here;
  }
}

export function choose(n: number, k: number): bigint {
  if (k < 0 || k > n) return 0n;
  let result = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) result = (result * BigInt(n - i + 1)) / BigInt(i);
  return result;
}

function withMessages(numbering: Pick<EnumerativeEncoder, 'n' | 'w' | 'count' | 'word' | 'index'>): EnumerativeEncoder {
  const { n, count } = numbering;
  const messageBits = count.toString(2).length - 1;
  const word = (index: bigint) => {
    if (typeof index !== 'bigint' || index < 0n || index >= count)
      throw new ParamError('index', index, `a number from 0 to ${count - 1n}`);
    return numbering.word(index);
  };
  return {
    ...numbering,
    messageBits,
    word,
    encode(message) {
      if (message.length !== messageBits)
        throw new ParamError('message', message.length, `${messageBits} message bits`);
      const bits = new Uint8Array(n);
      for (const p of word(fromBits(message))) bits[p] = 1;
      return bits;
    },
    decode(bits) {
      const ones = Array.from(bits.keys()).filter((p) => bits[p] === 1);
      const number = bits.length === n ? numbering.index(ones) : null;
      if (number === null || number >= 1n << BigInt(messageBits)) return null;
      return Uint8Array.from({ length: messageBits }, (_, i) => Number((number >> BigInt(messageBits - 1 - i)) & 1n));
    },
  };
}

const fromBits = (message: Uint8Array) => message.reduce((sum, bit) => (sum << 1n) | BigInt(bit & 1), 0n);
