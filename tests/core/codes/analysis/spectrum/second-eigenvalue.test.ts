import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { overlapSpectrum } from '../../../../../src/core/codes/analysis/spectrum/second-eigenvalue.ts';
import { tannerOrbits } from '../../../../../src/core/codes/analysis/tanner-orbits.ts';
import { deriveLdpc } from '../../../../../src/core/codes/ldpc.ts';
import { matrixFromRows, type SparseMatrix } from '../../../../../src/core/codes/sparse-matrix.ts';
import { buildDesign } from '../../../../../src/core/designs/design.ts';
import { plainEigenvalues } from '../../../../models/eigenvalues.ts';
import { circulantMatrix, quasiCyclicMatrix } from '../../../../models/gf2-models.ts';
import published from '../../../../reference/quasi-cyclic-codes.json' with { type: 'json' };

const second = (H: SparseMatrix) => overlapSpectrum(H, tannerOrbits(H), { operations: 1e8 })!.second;
const derived = (family: string, params: Record<string, number | string>, checks: 'blocks' | 'points') =>
  deriveLdpc(buildDesign({ family, params }), { checks }).H;

describe('second eigenvalue of HᵀH', () => {
  it.each([
    ['a projective plane of order 4: the order', circulantMatrix(21, [0, 1, 4, 14, 16]), 4, /aI \+ λJ/],
    ['the quadrangle W(3): s + t', derived('generalised-quadrangle', { kind: 'W', q: 3 }, 'blocks'), 6, /M² =/],
    ['the dual of a triple system: r − λ', derived('steiner-triple', { v: 15, method: 'bose' }, 'points'), 6, /M² =/],
  ])('%s, in whole numbers', (_, H, value, method) => {
    expect(second(H).value).toBe(value);
    expect(second(H).method).toMatch(method);
  });

  it('of Tanner’s [155, 64] code encloses that of Jacobi’s rotations from above, within 10^-6', () => {
    const H = quasiCyclicMatrix(
      31,
      published['G-tanner155'].value.shifts.map((row) => row.map((x) => [x])),
    );
    const exact = plainEigenvalues(H)[1]!;
    const { value, method } = second(H);
    expect(method).toMatch(/Fourier/);
    expect(value).toBeGreaterThanOrEqual(exact - 1e-12);
    expect(value).toBeLessThan(exact + 1e-6);
  });

  it('of circulants and of permuted matrices is never below, and close to, that of Jacobi’s rotations', () => {
    const bases = fc.tuple(fc.integer({ min: 5, max: 12 }), fc.integer({ min: 1, max: 2 }), fc.nat(1e6));
    fc.assert(
      fc.property(bases, ([size, blocks, seed]) => {
        const base = [0, 1].map((r) => Array.from({ length: blocks + 1 }, (_, b) => [(seed * (r + 2 * b + 1)) % size]));
        const H = quasiCyclicMatrix(size, base);
        // Columns in another order hide the circulants, so that the dense way is taken.
        const order = Array.from({ length: H.cols }, (_, c) => c).sort((a, b) => (a % 3) - (b % 3) || a - b);
        const hidden = matrixFromRows(
          H.cols,
          Array.from({ length: H.rows }, (_, r) =>
            Array.from(H.colIndex.subarray(H.rowStart[r], H.rowStart[r + 1]), (c) => order[c]!),
          ),
        );
        const exact = plainEigenvalues(H)[1]!;
        for (const matrix of [H, hidden]) {
          const { value } = second(matrix);
          expect(value).toBeGreaterThanOrEqual(exact - 1e-9);
          expect(value).toBeLessThan(exact + 1e-5);
        }
      }),
      { numRuns: 60 },
    );
  });

  it('is not given for irregular matrices, nor beyond the budget', () => {
    const irregular = matrixFromRows(3, [[0, 1], [0, 1, 2], [2]]);
    expect(overlapSpectrum(irregular, tannerOrbits(irregular), { operations: 1e8 })).toBeNull();
    const plane = circulantMatrix(21, [0, 1, 4, 14, 16]);
    expect(overlapSpectrum(plane, tannerOrbits(plane), { operations: 10 })).toBeNull();
  });
});
