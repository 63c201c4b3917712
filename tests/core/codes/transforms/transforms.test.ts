import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { girth } from '../../../../src/core/codes/analysis/girth.ts';
import { deriveLdpc, type Transform } from '../../../../src/core/codes/ldpc.ts';
import {
  matrixFromRows,
  rowOf,
  type SparseMatrix,
  syndrome,
  transpose,
} from '../../../../src/core/codes/sparse-matrix.ts';
import { exactFit } from '../../../../src/core/codes/transforms/exact-fit.ts';
import { applyTransforms, transformKinds } from '../../../../src/core/codes/transforms/registry.ts';
import { designFromBlocks } from '../../../../src/core/designs/block-design.ts';
import { rank } from '../../../../src/core/gf2/rank.ts';
import { allCodewords, circulantMatrix } from '../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';

const fano = circulantMatrix(7, [0, 1, 3]);
const plane4 = circulantMatrix(21, [0, 1, 4, 14, 16]);
const apply = (H: SparseMatrix, ...transforms: Transform[]) => applyTransforms({ H }, transforms).H;
const dimension = (H: SparseMatrix) => H.cols - rank(H);
/** Every bit checked, so that transforms accept it. */
const checkedMatrices = () => sparseMatrices(8, 10, 4).filter((H) => new Set(H.colIndex).size === H.cols);

describe('transforms', () => {
  it('shortening by s takes s from n and from k', () => {
    const short = apply(plane4, { kind: 'shorten', bits: 4 });
    expect([short.cols, dimension(short)]).toEqual([17, 7]);
  });

  it('shortened words are the words that are zero in the bits left out', () => {
    fc.assert(
      fc.property(checkedMatrices(), (H) => {
        fc.pre(dimension(H) >= 2);
        let short: SparseMatrix;
        try {
          short = apply(H, { kind: 'shorten', bits: 1 });
        } catch {
          return;
        }
        expect(allCodewords(short).length * 2).toBe(allCodewords(H).length);
      }),
      { numRuns: 60 },
    );
  });

  it('punctured words are the words without the bits left out', () => {
    fc.assert(
      fc.property(checkedMatrices(), fc.nat(9), (H, pick) => {
        const column = pick % H.cols;
        let punctured: SparseMatrix;
        try {
          punctured = apply(H, { kind: 'puncture', columns: [column] });
        } catch {
          return;
        }
        const low = (1 << column) - 1;
        const expected = new Set(allCodewords(H).map((w) => (w & low) | ((w >> (column + 1)) << column)));
        expect(new Set(allCodewords(punctured))).toEqual(expected);
      }),
      { numRuns: 100 },
    );
  });

  it('an overall parity bit makes every word even and keeps the dimension', () => {
    const extended = apply(fano, { kind: 'extend-by-parity' });
    expect(dimension(extended)).toBe(3);
    const odd = matrixFromRows(3, [
      [0, 1],
      [1, 2],
    ]);
    expect(allCodewords(apply(odd, { kind: 'extend-by-parity' }))).toEqual([0, 15]);
  });

  it('dropping dependent rows keeps the code and leaves full rank', () => {
    const core = apply(plane4, { kind: 'drop-dependent-rows' });
    expect(core.rows).toBe(10);
    expect(rank(core)).toBe(10);
  });

  it('split columns keep all ones, and split rows undo nothing of girth 6', () => {
    const split = apply(plane4, { kind: 'split-columns', parts: 2 });
    expect([split.rows, split.cols, split.colIndex.length]).toEqual([21, 42, 105]);
    expect(girth(apply(split, { kind: 'split-rows', parts: 2 }))).toBeGreaterThanOrEqual(6);
  });

  it('transposing twice is nothing', () => {
    const H = apply(plane4, { kind: 'split-columns', parts: 2 });
    expect(apply(H, { kind: 'transpose' }, { kind: 'transpose' })).toEqual(H);
    expect(apply(H, { kind: 'transpose' })).toEqual(transpose(H));
  });

  it('a mask clears its blocks, and a column left bare is refused', () => {
    const H = matrixFromRows(4, [
      [0, 2],
      [1, 3],
      [0, 3],
      [1, 2],
    ]);
    const masked = apply(H, { kind: 'mask', blockSize: 2, mask: ['10', '11'] });
    expect(Array.from(rowOf(masked, 0))).toEqual([0]);
    expect(() => apply(H, { kind: 'mask', blockSize: 2, mask: ['10', '10'] })).toThrow(/every bit checked/);
  });

  it('lifting reaches the girth asked for, the same code for the same seed', () => {
    const base = matrixFromRows(
      6,
      Array.from({ length: 3 }, () => [0, 1, 2, 3, 4, 5]),
    );
    for (const [size, target] of [
      [17, 6],
      [53, 8],
    ] as const) {
      const step = { kind: 'lift', size, girth: target, seed: 'buoy' };
      const H = apply(base, step);
      expect([H.rows, H.cols]).toEqual([3 * size, 6 * size]);
      expect(girth(H)).toBeGreaterThanOrEqual(target);
      expect(apply(base, step)).toEqual(H);
    }
  });

  it('a girth that no shifts reach is refused', () => {
    const base = matrixFromRows(
      6,
      Array.from({ length: 3 }, () => [0, 1, 2, 3, 4, 5]),
    );
    expect(() => apply(base, { kind: 'lift', size: 3, girth: 8, attempts: 3 })).toThrow(/larger size/);
  });

  it('superposition replaces ones by constituents in turn', () => {
    const base = matrixFromRows(2, [[0, 1], [1]]);
    const one = { cols: 2, rows: [[0], [1]] };
    const two = { cols: 2, rows: [[1], [0]] };
    const H = apply(base, { kind: 'superpose', constituents: [one, two] });
    expect(Array.from({ length: 4 }, (_, r) => Array.from(rowOf(H, r)))).toEqual([[0, 3], [1, 2], [3], [2]]);
  });

  it('keeps the parallel classes asked for in either orientation', () => {
    const square = designFromBlocks(
      4,
      [
        [0, 1],
        [2, 3],
        [0, 2],
        [1, 3],
        [0, 3],
        [1, 2],
      ],
      {
        classes: Uint32Array.from([0, 0, 1, 1, 2, 2]),
      },
    );
    const keep = [{ kind: 'keep-classes', classes: 2 }];
    expect(deriveLdpc(square, { checks: 'blocks', transforms: keep }).H.rows).toBe(4);
    expect(deriveLdpc(square, { checks: 'points', transforms: keep }).H.cols).toBe(4);
    expect(() =>
      deriveLdpc(square, { checks: 'blocks', transforms: [{ kind: 'keep-classes', classes: [5] }] }),
    ).toThrow(/classes from 0 to 2/);
  });

  it('an unknown kind or parameter is refused with what is known', () => {
    expect(() => apply(fano, { kind: 'fold' })).toThrow(/keep-classes/);
    expect(() => apply(fano, { kind: 'shorten', bits: 3 })).toThrow(/from 1 to 2/);
    expect(() => apply(fano, { kind: 'shorten', bits: 'two' })).toThrow(/transforms\[0\]\.bits/);
    expect(transformKinds.size).toBe(11);
  });

  it('fits payload and parity to the bit', () => {
    const fit = exactFit({ n: 21, k: 11 }, { payloadBits: 8, parityBits: 11 })!;
    expect(fit).toMatchObject({ shortenedBits: 3, spareParityBits: 0 });
    const H = apply(plane4, ...fit.transforms);
    expect([H.cols, dimension(H)]).toEqual([19, 8]);
    expect(exactFit({ n: 21, k: 11 }, { payloadBits: 12, parityBits: 10 })).toBeNull();
  });

  it('words of a lifted base satisfy its checks', () => {
    const H = apply(fano, { kind: 'lift', size: 5, girth: 6 });
    expect(syndrome(H, new Uint8Array(35).fill(0)).every((s) => s === 0)).toBe(true);
    expect(H.colIndex.length).toBe(21 * 5);
  });
});
