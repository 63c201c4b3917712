import { describe, expect, it } from 'vitest';
import { analyseLdpc } from '../../../src/core/codes/analyse-ldpc.ts';
import { matrixFromRows } from '../../../src/core/codes/sparse-matrix.ts';
import { circulantMatrix } from '../../models/gf2-models.ts';

describe('analysis of an LDPC code', () => {
  it('of PG(2,4) finds [21, 11], girth 6 and a distance that encloses 6', () => {
    const code = analyseLdpc({ H: circulantMatrix(21, [0, 1, 4, 14, 16]) });
    expect(code).toMatchObject({ n: 21, k: 11, rank: 10, girth: 6, cyclic: true });
    expect(code.cycles).toEqual({ 6: 1120, 8: 7560 });
    expect(code.rowWeights).toEqual([[5, 21]]);
    expect(code.distance.value.lower).toBe(6);
    expect(code.distance.value.upper).toBeGreaterThanOrEqual(6);
  });

  it('counts no cycles when asked not to', () => {
    expect(analyseLdpc({ H: circulantMatrix(7, [0, 1, 3]) }, { cycles: false }).cycles).toBeUndefined();
  });

  it('of a full-rank matrix says that no distance is defined', () => {
    const code = analyseLdpc({ H: matrixFromRows(2, [[0], [1]]) });
    expect(code).toMatchObject({ k: 0, rate: 0, girth: Number.POSITIVE_INFINITY });
    expect(code.distance.value).toEqual({ lower: 0, upper: 0 });
  });
});
