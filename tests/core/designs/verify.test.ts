import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { mapsBlocksOntoThemselves, orbitRepresentatives } from '../../../src/core/designs/block-symmetry.ts';
import { coverageOf, MAX_COUNTED_SUBSETS, verifyDesign } from '../../../src/core/designs/verify.ts';
import { LimitError, ParamError } from '../../../src/core/errors.ts';
import { plainCoverage, subsets } from '../../models/subset-coverage.ts';

const fano = designFromBlocks(
  7,
  Array.from({ length: 7 }, (_, i) => [i, (i + 1) % 7, (i + 3) % 7]),
);
const shift = (v: number) => Uint32Array.from({ length: v }, (_, p) => (p + 1) % v);

describe('verifyDesign', () => {
  it('certifies the plane of order 2 and says every pair was counted', () => {
    expect(verifyDesign(fano, { t: 2, lambda: 1 })).toEqual({
      holds: true,
      t: 2,
      lambda: 1,
      v: 7,
      k: 3,
      b: 7,
      r: 3,
      method: 'all 21 2-subsets counted',
      subsetsCounted: 21,
    });
  });

  it('gives a pair that is missed and a pair that is covered twice, with the true number of blocks on it', () => {
    const missing = designFromBlocks(7, [...blocksOf(fano).slice(1), [0, 1, 4]]);
    const c = verifyDesign(missing, { t: 2, lambda: 1 });
    expect(c.holds).toBe(false);
    const { points, covered } = c.counterexample!;
    expect(blocksOf(missing).filter((b) => points.every((p) => b.includes(p)))).toHaveLength(covered);
    expect(covered).not.toBe(1);
    const tripled = designFromBlocks(4, [
      [0, 1, 2],
      [0, 1, 3],
      [0, 1, 2],
    ]);
    expect(verifyDesign(tripled, { t: 2, lambda: 1 }).counterexample).toEqual({ points: [0, 1], covered: 3 });
  });

  it('refuses blocks of different sizes with a reason, not an error', () => {
    const c = verifyDesign(
      designFromBlocks(4, [
        [0, 1, 2],
        [0, 3],
        [1, 3],
        [2, 3],
      ]),
      { t: 2, lambda: 1 },
    );
    expect(c).toMatchObject({ holds: false, reason: 'block 1 has 2 points where others have 3' });
  });

  it('finds a repeated or unordered point in a hand-made design', () => {
    const bad = { v: 4, b: 1, blockStart: new Uint32Array([0, 3]), blockPoints: new Uint32Array([0, 2, 2]) };
    expect(verifyDesign(bad, { t: 1, lambda: 1 }).reason).toMatch(/distinct points/);
    const high = { v: 2, b: 1, blockStart: new Uint32Array([0, 2]), blockPoints: new Uint32Array([0, 2]) };
    expect(verifyDesign(high, { t: 1, lambda: 1 }).reason).toMatch(/not below 2/);
  });

  it('holds for all k-subsets of a set with λ = C(v−t, k−t), for every t up to 5', () => {
    const all = designFromBlocks(9, subsets([0, 1, 2, 3, 4, 5, 6, 7, 8], 6));
    for (const [t, lambda] of [
      [1, 56],
      [2, 35],
      [3, 20],
      [4, 10],
      [5, 4],
    ] as const) {
      expect(verifyDesign(all, { t, lambda }).holds).toBe(true);
      expect(verifyDesign(all, { t, lambda: lambda + 1 }).holds).toBe(false);
      expect(verifyDesign(all, { t, lambda: lambda - 1 }).holds).toBe(false);
    }
  });

  it('refuses t outside 1..5 and lambda below 1', () => {
    expect(() => verifyDesign(fano, { t: 6, lambda: 1 })).toThrow(ParamError);
    expect(() => verifyDesign(fano, { t: 2, lambda: 0 })).toThrow(ParamError);
  });

  it('states the limit when the counters do not fit and no symmetry is known', () => {
    const v = 30_000;
    const wide = designFromBlocks(v, [[0, 1, 2]]);
    expect(() => verifyDesign(wide, { t: 2, lambda: 1 })).toThrow(LimitError);
    expect(() => verifyDesign(wide, { t: 2, lambda: 1 })).toThrow(String(MAX_COUNTED_SUBSETS));
  });

  it('uses verified symmetry for a design too large to count, and says so', () => {
    // Two-point blocks: the complete graph as a 2-(v,2,1) design developed from differences is too large; a ring
    // of v blocks is enough to see that symmetry alone does not make a claim hold.
    const v = 30_001;
    const ring = designFromBlocks(
      v,
      Array.from({ length: v }, (_, i) => [i, (i + 1) % v]),
      {
        symmetry: [{ order: v, pointPerm: shift(v) }],
      },
    );
    const c = verifyDesign(ring, { t: 2, lambda: 1 });
    expect(c.method).toMatch(/symmetry generator/);
    expect(c).toMatchObject({ holds: false, counterexample: { points: [0, 2], covered: 0 } });
  });

  it('counts like the plain twin on random block lists', () => {
    const lists = fc.integer({ min: 5, max: 9 }).chain((v) =>
      fc.tuple(
        fc.constant(v),
        fc.integer({ min: 1, max: 5 }),
        fc.array(
          fc.subarray(
            Array.from({ length: v }, (_, p) => p),
            { minLength: 1 },
          ),
          { minLength: 1, maxLength: 12 },
        ),
      ),
    );
    fc.assert(
      fc.property(lists, ([v, t, blocks]) => {
        const design = designFromBlocks(v, blocks);
        const plain = plainCoverage(design, t);
        const { ranking, counts } = coverageOf(design, t);
        expect(ranking.count).toBe(plain.size);
        const sorted = [...plain.keys()].map((key) => key.split(',').map(Number)).sort(colex);
        expect([...counts]).toEqual(sorted.map((s) => plain.get(s.join())));
      }),
      { numRuns: 200 },
    );
  });
});

describe('symmetry of a block list', () => {
  it('is told from a permutation that only looks like one', () => {
    expect(mapsBlocksOntoThemselves(fano, shift(7))).toBe(true);
    expect(mapsBlocksOntoThemselves(fano, [1, 0, 2, 3, 4, 5, 6])).toBe(false);
    expect(mapsBlocksOntoThemselves(fano, [0, 0, 2, 3, 4, 5, 6])).toBe(false);
  });

  it('counts repeated blocks', () => {
    const d = designFromBlocks(4, [
      [0, 1],
      [0, 1],
      [2, 3],
    ]);
    expect(mapsBlocksOntoThemselves(d, [2, 3, 0, 1])).toBe(false);
    expect(mapsBlocksOntoThemselves(d, [1, 0, 3, 2])).toBe(true);
  });

  it('has one representative an orbit', () => {
    expect(orbitRepresentatives(7, [shift(7)])).toEqual([0]);
    expect(orbitRepresentatives(5, [[1, 0, 3, 2, 4]])).toEqual([0, 2, 4]);
  });
});

function blocksOf(d: typeof fano): number[][] {
  return Array.from({ length: d.b }, (_, i) => [...d.blockPoints.slice(d.blockStart[i], d.blockStart[i + 1])]);
}

function colex(a: number[], b: number[]): number {
  for (let i = a.length - 1; i >= 0; i--) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return 0;
}
