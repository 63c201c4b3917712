import { describe, expect, it } from 'vitest';
import { positionBelow, randomFrom, streamState, uniform53 } from '../../../src/core/simulation/random.ts';

describe('xoshiro128++', () => {
  // Outputs of the authors' public-domain C program (prng.di.unimi.it/xoshiro128plusplus.c), transcribed and compiled
  // with g++ 12 for this test; not a download.
  it('gives the words of the published program from state 1, 2, 3, 4', () => {
    const random = randomFrom([1, 2, 3, 4]);
    expect(Array.from({ length: 10 }, () => random.next32())).toEqual([
      641, 1573767, 3222811527, 3517856514, 836907274, 4247214768, 3867114732, 1355841295, 495546011, 621204420,
    ]);
  });

  it('gives the words of the published program far on, from a state with high bits set', () => {
    const random = randomFrom([0xdeadbeef, 0x01234567, 0x89abcdef, 0xfeedface]);
    expect(Array.from({ length: 10 }, () => random.next32())).toEqual([
      2894765533, 3515589521, 1188853698, 2472132684, 750400099, 3154894294, 2677215212, 4066851549, 900600260,
      3203341597,
    ]);
    let folded = 0;
    for (let i = 10; i < 1_000_000; i++) {
      folded ^= random.next32();
      folded = (folded << 1) | (folded >>> 31);
    }
    expect(folded >>> 0).toBe(1295838114);
  });
});

describe('the state of a stream', () => {
  it('is the first 16 bytes of SHA-256 of seed, zero byte and index, little-endian', async () => {
    // printf 'demo\0007' | sha256sum  →  5322e709 5eaba427 2f094784 c43bd6fd …
    expect(Array.from(await streamState('demo', 7))).toEqual([0x09e72253, 0x27a4ab5e, 0x8447092f, 0xfdd63bc4]);
  });

  it('differs between shards, seeds and named streams', async () => {
    const states = await Promise.all([
      streamState('a', 0),
      streamState('a', 1),
      streamState('b', 0),
      streamState('a', 0, 'sent'),
    ]);
    expect(new Set(states.map(String)).size).toBe(4);
  });
});

describe('draws', () => {
  it('positions below n are uniform (chi-square at 5 standard deviations)', () => {
    const random = randomFrom([5, 6, 7, 8]);
    const n = 21;
    const counts = new Float64Array(n);
    const draws = 420_000;
    for (let i = 0; i < draws; i++) counts[positionBelow(n, random)]!++;
    const expected = draws / n;
    const chiSquare = counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
    expect(Math.abs(chiSquare - (n - 1))).toBeLessThan(5 * Math.sqrt(2 * (n - 1)));
  });

  it('position draws reject exactly the words that would favour a position', () => {
    // 2^32 mod 3 = 1: only the word 0, whose product has a low half of 0, is refused.
    const words = [0, 0x55555556, 0xffffffff];
    expect(positionBelow(3, { next32: () => words.shift()! })).toBe(1);
    expect(words).toEqual([0xffffffff]);
  });

  it('uniform numbers have mean 1/2 and variance 1/12 within 5 standard errors', () => {
    const random = randomFrom([9, 8, 7, 6]);
    const draws = 400_000;
    let sum = 0;
    let squares = 0;
    for (let i = 0; i < draws; i++) {
      const u = uniform53(random);
      sum += u;
      squares += (u - 0.5) ** 2;
    }
    expect(Math.abs(sum / draws - 0.5)).toBeLessThan(5 * Math.sqrt(1 / 12 / draws));
    expect(Math.abs(squares / draws - 1 / 12)).toBeLessThan(5 * Math.sqrt(1 / 180 / draws));
  });
});
