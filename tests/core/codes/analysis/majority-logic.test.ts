import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { girth } from '../../../../src/core/codes/analysis/girth.ts';
import { multiStepMajority, oneStepRadius } from '../../../../src/core/codes/analysis/majority-logic.ts';
import { tannerOrbits } from '../../../../src/core/codes/analysis/tanner-orbits.ts';
import { rowOf, transpose } from '../../../../src/core/codes/sparse-matrix.ts';
import { blockOf } from '../../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';

const flats = (family: string, params: Record<string, number | string>) => {
  const design = buildDesign({ family, params });
  return Array.from({ length: design.b }, (_, i) => new Set(blockOf(design, i)));
};

describe('majority logic in steps', () => {
  it.each([
    ['projective-geometry', { m: 3, q: 2 }, 2],
    ['projective-geometry', { m: 4, q: 2 }, 3],
    ['affine-geometry', { m: 3, q: 3, origin: 'with' }, 2],
    ['affine-geometry', { m: 3, q: 4, origin: 'without' }, 2],
  ] as const)(
    '%s %o: the flats on each smaller flat are as many as said, and meet in it alone',
    (family, params, flat) => {
      const { value } = multiStepMajority({
        H: empty,
        design: { family, params: { ...params, flat } },
        checks: 'blocks',
      })!;
      expect(value.steps.map(({ dimension }) => dimension)).toEqual(
        Array.from({ length: flat }, (_, i) => flat - 1 - i),
      );
      for (const { dimension, orthogonal } of value.steps) {
        const larger = flats(family, { ...params, flat: dimension + 1 });
        const inner = dimension === 0 ? [new Set([0])] : flats(family, { ...params, flat: dimension }).slice(0, 3);
        for (const small of inner) {
          const through = larger.filter((set) => [...small].every((point) => set.has(point)));
          expect(through).toHaveLength(orthogonal);
          const met = through.flatMap((set) => [...set].filter((point) => !small.has(point)));
          expect(new Set(met).size).toBe(met.length);
        }
      }
    },
  );

  it('radius of the hyperplane code of PG(3,4): 2 errors in 2 steps', () => {
    const design = { family: 'projective-geometry', params: { m: 3, q: 4, flat: 2 } };
    expect(multiStepMajority({ H: empty, design, checks: 'points' })?.value).toEqual({
      steps: [
        { dimension: 1, orthogonal: 5 },
        { dimension: 0, orthogonal: 21 },
      ],
      radius: 2,
    });
  });

  it('is not claimed for other designs, nor after a transform', () => {
    const design = { family: 'projective-geometry', params: { m: 3, q: 4, flat: 1 } };
    expect(multiStepMajority({ H: empty, design, checks: 'points' })).toBeNull();
    expect(multiStepMajority({ H: empty, design, checks: 'blocks', transforms: [{ kind: 'shorten' }] })).toBeNull();
  });
});

const empty = { rows: 0, cols: 0, rowStart: new Uint32Array(1), colIndex: new Uint32Array(0) };

describe('one step of majority logic', () => {
  it('corrects every pattern of as many errors as the radius says', () => {
    fc.assert(
      fc.property(sparseMatrices(10, 7), (H) => {
        const { value: radius } = oneStepRadius(H, girth(H), tannerOrbits(H));
        const T = transpose(H);
        for (let pattern = 0; pattern < 2 ** H.cols; pattern++) {
          const errors = Array.from({ length: H.cols }, (_, c) => (pattern >> c) & 1);
          if (errors.reduce((sum, e) => sum + e, 0) > radius) continue;
          const failed = Array.from({ length: H.rows }, (_, r) => rowOf(H, r).reduce((sum, c) => sum ^ errors[c]!, 0));
          errors.forEach((error, c) => {
            const checks = Array.from(rowOf(T, c));
            const against = checks.filter((r) => failed[r] === 1).length;
            expect(2 * against > checks.length ? 1 : 0).toBe(error);
          });
        }
      }),
      { numRuns: 200 },
    );
  });
});
