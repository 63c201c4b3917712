import { describe, expect, it } from 'vitest';
import { analyseLdpc } from '../../../src/core/codes/analyse-ldpc.ts';
import { cycleHistogram } from '../../../src/core/codes/analysis/cycle-histogram.ts';
import { matrixFromRows, transpose } from '../../../src/core/codes/sparse-matrix.ts';
import { circulantMatrix, quasiCyclicMatrix } from '../../models/gf2-models.ts';

const fano = circulantMatrix(7, [0, 1, 3]);

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

  it('knows circulants in blocks, the words of weight 4 and how many cycles pass a bit', () => {
    const code = analyseLdpc({ H: transpose(fano) });
    expect(code.weightFourWords?.value).toBe(7);
    expect(cycleHistogram(code.cyclesPerColumn, 6)).toEqual([[12, 7]]);
    expect(cycleHistogram(code.cyclesPerColumn, 20)).toBeNull();
    const blocks = analyseLdpc({
      H: quasiCyclicMatrix(13, [
        [
          [0, 1, 4],
          [0, 2, 7],
        ],
      ]),
    });
    expect(blocks.quasiCyclic).toEqual({ size: 13, blocks: 2 });
  });

  it('of a full-rank matrix says that no distance is defined', () => {
    const code = analyseLdpc({ H: matrixFromRows(2, [[0], [1]]) });
    expect(code).toMatchObject({ k: 0, rate: 0, girth: Number.POSITIVE_INFINITY });
    expect(code.distance.value).toEqual({ lower: 0, upper: 0 });
  });
});
