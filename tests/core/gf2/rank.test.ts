import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matrixFromRows } from '../../../src/core/codes/sparse-matrix.ts';
import { circulantOf, cyclicGenerators, cyclicRank } from '../../../src/core/gf2/cyclic.ts';
import { fourRussiansRank } from '../../../src/core/gf2/four-russians.ts';
import { eliminationRank, insertionRank, rank } from '../../../src/core/gf2/rank.ts';
import { circulantMatrix, plainRank } from '../../models/gf2-models.ts';
import { sparseMatrices } from '../../models/random-matrices.ts';

describe('rank over GF(2)', () => {
  it('equals plain elimination on sparse matrices, however it is found', () => {
    fc.assert(
      fc.property(sparseMatrices(40, 70), (H) => {
        const expected = plainRank(H);
        expect(insertionRank(H)).toBe(expected);
        expect(fourRussiansRank(H)).toBe(expected);
        expect(eliminationRank(H)).toBe(expected);
        expect(rank(H)).toBe(expected);
      }),
      { numRuns: 300 },
    );
  });

  it('by the kernel equals insertion on larger matrices of every density', () => {
    fc.assert(
      fc.property(sparseMatrices(300, 200, 200), (H) => {
        expect(fourRussiansRank(H)).toBe(insertionRank(H));
      }),
      { numRuns: 40 },
    );
  });

  it('of a circulant is n − deg gcd(h, x^n + 1)', () => {
    fc.assert(
      fc.property(
        fc
          .integer({ min: 2, max: 60 })
          .chain((n) => fc.tuple(fc.constant(n), fc.uniqueArray(fc.nat(n - 1), { minLength: 1 }))),
        ([n, offsets]) => {
          const H = circulantMatrix(n, offsets);
          expect(cyclicRank(H)).toBe(plainRank(H));
        },
      ),
      { numRuns: 200 },
    );
  });

  it('knows a circulant in either direction, and nothing else', () => {
    const H = circulantMatrix(7, [0, 1, 3]);
    expect(circulantOf(H)).toMatchObject({ n: 7, step: 1, offsets: Uint32Array.from([0, 1, 3]) });
    const backwards = matrixFromRows(
      7,
      Array.from({ length: 7 }, (_, i) => [0, 1, 3].map((d) => (d + 7 - i) % 7)),
    );
    expect(circulantOf(backwards)?.step).toBe(-1);
    expect(circulantOf(matrixFromRows(3, [[0], [1], [1]]))).toBeNull();
  });

  it('sees rows closed under the shift in any order, one generator an orbit', () => {
    const orbit = (offsets: number[]) => Array.from({ length: 13 }, (_, i) => offsets.map((d) => (d + i * 5) % 13));
    const H = matrixFromRows(13, [...orbit([0, 1, 4]), ...orbit([0, 2, 7])]);
    expect(cyclicGenerators(H)).toHaveLength(2);
    expect(rank(H)).toBe(plainRank(H));
    expect(cyclicGenerators(matrixFromRows(13, orbit([0, 1, 4]).slice(1)))).toBeNull();
  });
});
