import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bchBound, longestBchRun } from '../../../../../src/core/codes/analysis/distance/bch-bound.ts';
import {
  bitOrientedBound,
  parityOrientedBound,
} from '../../../../../src/core/codes/analysis/distance/eigenvalue-bounds.ts';
import { geometryDistance } from '../../../../../src/core/codes/analysis/distance/geometry.ts';
import { lowerBounds } from '../../../../../src/core/codes/analysis/distance/lower-bounds.ts';
import { girth } from '../../../../../src/core/codes/analysis/girth.ts';
import { overlapSpectrum } from '../../../../../src/core/codes/analysis/spectrum/second-eigenvalue.ts';
import { tannerOrbits } from '../../../../../src/core/codes/analysis/tanner-orbits.ts';
import { matrixFromRows, type SparseMatrix } from '../../../../../src/core/codes/sparse-matrix.ts';
import { allCodewords, circulantMatrix, quasiCyclicMatrix } from '../../../../models/gf2-models.ts';
import planeCodes from '../../../../reference/plane-codes.json' with { type: 'json' };

const spectrumOf = (H: SparseMatrix) => overlapSpectrum(H, tannerOrbits(H), { operations: 1e8 })!;
const ones = (word: number) => word.toString(2).replaceAll('0', '').length;

/** Checks of the cyclic code with generator polynomial g: the reversed check polynomial and its shifts. */
function cyclicChecks(n: number, h: readonly number[], k: number): SparseMatrix {
  return circulantMatrix(
    n,
    h.map((e) => k - e),
  );
}

describe('Tanner’s bounds', () => {
  it('reach q + 2 in planes of even order and 2(q + 1) in the quadrangle W(3), where both are exact', () => {
    const plane = circulantMatrix(273, planeCodes['B-pds-16'].value.canonical);
    expect(bitOrientedBound(273, spectrumOf(plane))?.value).toBe(planeCodes['A-pg2-16'].value.dmin);
    const spectrum = { columnWeight: 4, rowWeight: 4, largest: 16 };
    const six = { value: 6, grade: 'proved' as const, method: 's + t' };
    expect(bitOrientedBound(40, { ...spectrum, second: six })?.value).toBe(8);
    expect(parityOrientedBound(40, { ...spectrum, second: six })?.value).toBe(8);
  });

  it('and all other bounds never pass the distance of small codes of circulants', () => {
    const bases = fc.tuple(fc.integer({ min: 3, max: 7 }), fc.integer({ min: 1, max: 2 })).chain(([size, blocks]) =>
      fc.tuple(
        fc.constant(size),
        fc.array(
          fc.array(fc.uniqueArray(fc.nat(size - 1), { minLength: 1, maxLength: 2 }), {
            minLength: blocks,
            maxLength: blocks,
          }),
          { minLength: 1, maxLength: 2 },
        ),
      ),
    );
    fc.assert(
      fc.property(bases, ([size, base]) => {
        const H = quasiCyclicMatrix(size, base);
        const words = allCodewords(H).filter((word) => word !== 0);
        fc.pre(words.length > 0);
        const least = Math.min(...words.map(ones));
        const spectrum = overlapSpectrum(H, tannerOrbits(H), { operations: 1e8 });
        const leastColumnWeight = Math.min(...weightsOfColumns(H));
        const cyclic = base[0]!.length === 1;
        for (const { value, method } of lowerBounds(H, { girth: girth(H), leastColumnWeight, cyclic, spectrum }))
          expect(value, method).toBeLessThanOrEqual(least);
      }),
      { numRuns: 300 },
    );
  });
});

function weightsOfColumns(H: SparseMatrix): number[] {
  const weights = new Array<number>(H.cols).fill(0);
  for (const c of H.colIndex) weights[c]!++;
  return weights;
}

describe('the BCH bound', () => {
  it('of the Golay code [23, 12] is 5, of the [15, 7] and [15, 5] codes of their names 5 and 7', () => {
    // Check polynomials: (x^23 + 1)/g for g = x^11 + x^9 + x^7 + x^6 + x^5 + x + 1; the others by their zeros.
    expect(longestBchRun(cyclicChecks(23, [0, 1, 2, 3, 4, 7, 10, 12], 12))?.distance).toBe(5);
    expect(longestBchRun(cyclicChecks(15, [0, 4, 6, 7], 7))?.distance).toBe(5);
    expect(longestBchRun(cyclicChecks(15, [0, 1, 3, 5], 5))?.distance).toBe(7);
  });

  it.each([
    [4, planeCodes['B-pds-4'].value.canonical],
    [8, planeCodes['B-pds-8'].value.canonical],
    [16, planeCodes['B-pds-16'].value.canonical],
  ])('of the plane of order %i is its distance q + 2', (q, offsets) => {
    expect(bchBound(circulantMatrix(q * q + q + 1, offsets))?.value).toBe(q + 2);
  });

  it('is not given for codes that are not cyclic, or of even length', () => {
    expect(bchBound(matrixFromRows(5, [[0, 1, 3]]))).toBeNull();
    expect(bchBound(circulantMatrix(6, [0, 1]))).toBeNull();
  });
});

describe('distances by theorem', () => {
  it.each([
    ['projective-geometry', { m: 3, q: 4, flat: 1 }, 'blocks', 24],
    ['projective-geometry', { m: 3, q: 4, flat: 2 }, 'points', 6],
    ['affine-geometry', { m: 3, q: 2, flat: 2, origin: 'with' }, 'blocks', 4],
    ['affine-geometry', { m: 3, q: 4, flat: 1, origin: 'without' }, 'blocks', 23],
    ['generalised-quadrangle', { kind: 'H3', q: 2 }, 'blocks', 6],
    ['generalised-quadrangle', { kind: 'Q4', q: 3 }, 'points', 8],
  ] as const)('%s %o, checks on %s: %i', (family, params, checks, distance) => {
    expect(geometryDistance({ family, params }, checks)?.value).toBe(distance);
  });

  it('say nothing of odd order or of the points of Q(4,3)', () => {
    expect(geometryDistance({ family: 'projective-plane', params: { q: 9 } }, 'blocks')).toBeNull();
    expect(geometryDistance({ family: 'generalised-quadrangle', params: { kind: 'Q4', q: 3 } }, 'blocks')).toBeNull();
  });
});
