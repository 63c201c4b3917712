import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { countCycles } from '../../../../src/core/codes/analysis/cycles.ts';
import { girth } from '../../../../src/core/codes/analysis/girth.ts';
import { tannerOrbits } from '../../../../src/core/codes/analysis/tanner-orbits.ts';
import { matrixFromRows, type SparseMatrix } from '../../../../src/core/codes/sparse-matrix.ts';
import { plainCycles } from '../../../models/cycle-models.ts';
import { circulantMatrix } from '../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';

const counted = (H: SparseMatrix, longest: number) => {
  const orbits = tannerOrbits(H);
  return countCycles(H, girth(H, orbits), longest, orbits);
};

describe('cycles of the Tanner graph', () => {
  it('girth and counts equal those of walking every path', () => {
    fc.assert(
      fc.property(sparseMatrices(9, 9, 3), (H) => {
        const plain = plainCycles(H, 10);
        const shortest = Math.min(...plain.keys());
        expect(Math.min(girth(H), 12)).toBe(Math.min(shortest, 12));
        for (const longest of [6, 8, 10]) {
          for (const [length, total] of counted(H, longest).total) expect(total).toBe(plain.get(length) ?? 0);
        }
      }),
      { numRuns: 300 },
    );
  });

  it('of length 6 in a projective plane are the triangles, n(n − 1)q²/6', () => {
    for (const [q, offsets] of [
      [2, [0, 1, 3]],
      [3, [0, 1, 3, 9]],
      [4, [0, 1, 4, 14, 16]],
    ] as const) {
      const n = q * q + q + 1;
      expect(counted(circulantMatrix(n, offsets), 6).total.get(6)).toBe((n * (n - 1) * q * q) / 6);
    }
  });

  it('through a column add up to half the length times the total', () => {
    const H = circulantMatrix(21, [0, 1, 4, 14, 16]);
    const { total, perColumn } = counted(H, 10);
    for (const [length, each] of perColumn) {
      expect(each.reduce((sum, x) => sum + x, 0)).toBe((Number(total.get(length)) * length) / 2);
    }
  });

  it('stop at 2g − 2 and say so', () => {
    const square = matrixFromRows(2, [
      [0, 1],
      [0, 1],
    ]);
    const { total, stoppedBy } = counted(square, 8);
    expect([...total]).toEqual([
      [4, 1],
      [6, 0],
    ]);
    expect(stoppedBy).toBe('length limit of the method');
  });
});
