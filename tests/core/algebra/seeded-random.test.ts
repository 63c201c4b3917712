import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/core/algebra/seeded-random.ts';

describe('seededRandom', () => {
  it('gives the same words for the same text and others for another', () => {
    const words = (seed: string) =>
      Array.from(
        { length: 8 },
        (
          (r) => () =>
            r.next32()
        )(seededRandom(seed)),
      );
    expect(words('a')).toEqual(words('a'));
    expect(words('a')).not.toEqual(words('b'));
    expect(words('')).not.toEqual(words('\u0000'));
  });

  it('draws below any n up to 2^32', () => {
    fc.assert(
      fc.property(fc.string(), fc.integer({ min: 1, max: 2 ** 32 }), (seed, n) => {
        const random = seededRandom(seed);
        for (let i = 0; i < 20; i++) {
          const x = random.below(n);
          expect(Number.isInteger(x) && x >= 0 && x < n).toBe(true);
        }
      }),
    );
  });

  it('draws each of six faces about as often (chi-square below 20.5, the 0.1% point of 5 degrees)', () => {
    const random = seededRandom('die');
    const faces = new Array<number>(6).fill(0);
    for (let i = 0; i < 60_000; i++) faces[random.below(6)]!++;
    expect(faces.reduce((sum, f) => sum + (f - 10_000) ** 2 / 10_000, 0)).toBeLessThan(20.5);
  });

  it('shuffles to a permutation', () => {
    const list = seededRandom('s').shuffle(Uint32Array.from({ length: 100 }, (_, i) => i));
    expect([...list].sort((a, b) => a - b)).toEqual(Array.from({ length: 100 }, (_, i) => i));
  });
});
