import { type Random, randomFrom } from '../simulation/random.ts';

/** The generator handed to searches: the same text gives the same search on every machine. */
export interface SeededRandom extends Random {
  /** A uniform whole number below n, 1 ≤ n ≤ 2^32. */
  below(n: number): number;
  /** Fisher–Yates in place; returns its argument. */
  shuffle<T extends number[] | Uint32Array | Int32Array | Uint16Array>(list: T): T;
}

/** xoshiro128++ (Blackman and Vigna 2021) from a text. Synchronous, so the state comes from a mixing of the text by
 *  the finaliser of MurmurHash3 (Appleby 2011), not from SHA-256: good for searches, not for the error patterns of a run. */
export function seededRandom(seed: string): SeededRandom {
  const random = randomFrom(stateOf(seed));
  const below = (n: number) => {
    // Lemire 2019: the high word of a product, rejecting the few products that would make it uneven.
    const refused = 2 ** 32 % n;
    for (;;) {
      const word = random.next32();
      const low = Math.imul(word, n) >>> 0;
      if (low >= refused) return (word * n - low) / 2 ** 32;
    }
  };
  return {
    next32: random.next32,
    below: (n) => (n <= 2 ** 21 ? below(n) : belowWide(random, n)),
    shuffle(list) {
      for (let i = list.length - 1; i > 0; i--) {
        const j = below(i + 1);
        const held = list[i]!;
        list[i] = list[j]!;
        list[j] = held;
      }
      return list;
    },
  };
}

/** For n whose product with a word passes 2^53: plain rejection on the next power of two. */
function belowWide(random: Random, n: number): number {
  const shift = Math.clz32(n - 1);
  for (;;) {
    const x = random.next32() >>> shift;
    if (x < n) return x;
  }
}

/** Four words, each a chain of mixing steps over the text's UTF-16 units under its own starting constant. */
function stateOf(seed: string): number[] {
  const words = [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344].map((start) => {
    let h = start ^ seed.length;
    for (let i = 0; i < seed.length; i++) h = mix(h ^ Math.imul(seed.charCodeAt(i) + 1, 0x9e3779b1));
    return mix(h ^ start);
  });
  return words.every((w) => w === 0) ? [1, 2, 3, 4] : words;
}

function mix(x: number): number {
  let h = x;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}
