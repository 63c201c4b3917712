/** xoshiro128++ of Blackman and Vigna, "Scrambled linear pseudorandom number generators", ACM TOMS 47 (2021): 128 bits
 *  of state, 32-bit output, period 2^128 − 1; the authors report that it passes BigCrush and PractRand. Not for secrets. */
export interface Random {
  /** The next word, from 0 to 2^32 − 1. */
  next32(): number;
}

/** Stands in for the all-zero state, the one state the generator may not have: 2^32/φ, in every word. */
const zeroStandIn = 0x9e3779b9;

/** The generator's first state for a stream: the first 16 bytes of SHA-256 over the UTF-8 of `seed`, a zero byte and
 *  the shard's index in decimal, as four little-endian words. A stream other than the errors' own is told apart by
 *  one more zero byte and its name. Streams overlap with a probability below 2^-60 for any run we can do. */
export async function streamState(seed: string, index: number, stream = ''): Promise<Uint32Array> {
  const name = stream === '' ? `${seed}\u0000${index}` : `${seed}\u0000${index}\u0000${stream}`;
  const digest = new DataView(await crypto.subtle.digest('SHA-256', new TextEncoder().encode(name)));
  const state = Uint32Array.from([0, 4, 8, 12], (at) => digest.getUint32(at, true));
  return state.every((word) => word === 0) ? state.fill(zeroStandIn) : state;
}

/** The generator from a state of four words, which is left as it was. */
export function randomFrom(state: ArrayLike<number>): Random {
  let s0 = state[0]! | 0;
  let s1 = state[1]! | 0;
  let s2 = state[2]! | 0;
  let s3 = state[3]! | 0;
  return {
    next32() {
      const sum = (s0 + s3) | 0;
      const result = (((sum << 7) | (sum >>> 25)) + s0) >>> 0;
      const shifted = s1 << 9;
      s2 ^= s0;
      s3 ^= s1;
      s1 ^= s2;
      s0 ^= s3;
      s2 ^= shifted;
      s3 = (s3 << 11) | (s3 >>> 21);
      return result;
    },
  };
}

/** The generator of shard `index` of a run. */
export async function randomOf(seed: string, index: number, stream = ''): Promise<Random> {
  return randomFrom(await streamState(seed, index, stream));
}

/** The longest word whose positions `positionBelow` draws exactly. */
export const longestWord = 2 ** 21;

/** A uniformly random whole number below n ≤ 2^21, by Lemire's multiplication with rejection (ACM TOMACS 29, 2019):
 *  exactly uniform, and r·n stays below 2^53. */
export function positionBelow(n: number, random: Random): number {
  const refused = 2 ** 32 % n;
  for (;;) {
    const product = random.next32() * n;
    if (product % 2 ** 32 >= refused) return Math.floor(product / 2 ** 32);
  }
}

/** A uniform multiple of 2^-53 in [0, 1), from two words: 27 high bits of the first, 26 of the second. */
export function uniform53(random: Random): number {
  const high = random.next32() >>> 5;
  const low = random.next32() >>> 6;
  return (high * 2 ** 26 + low) * 2 ** -53;
}
