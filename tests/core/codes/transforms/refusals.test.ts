import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Transform } from '../../../../src/core/codes/ldpc.ts';
import { deriveLdpc } from '../../../../src/core/codes/ldpc.ts';
import { matrixFromRows, type SparseMatrix } from '../../../../src/core/codes/sparse-matrix.ts';
import { exactFit, rankFits } from '../../../../src/core/codes/transforms/exact-fit.ts';
import { applyTransforms, transformKinds } from '../../../../src/core/codes/transforms/registry.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { ParamError } from '../../../../src/core/errors.ts';
import { rank } from '../../../../src/core/gf2/rank.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';

const apply = (H: SparseMatrix, ...transforms: Transform[]) => applyTransforms({ H }, transforms).H;

/** Rows 0 and 1 alone, and bits 0 and 1 checked once each. */
const pair = matrixFromRows(4, [
  [0, 2],
  [1, 3],
]);
/** Square, with a row that checks nothing. */
const idleRow = matrixFromRows(3, [[0, 1], [1, 2], []]);
const zero = matrixFromRows(3, [[], []]);
const bareBit = matrixFromRows(3, [
  [0, 1],
  [0, 1],
]);

describe('a transform that leaves no code or an unchecked bit is refused, with the reason', () => {
  it.each([
    [
      'keep-classes: a bit off every kept class',
      classed(),
      { kind: 'keep-classes', classes: [0] },
      /column 1 without a one/,
    ],
    ['drop-dependent-rows: every row is zero', zero, { kind: 'drop-dependent-rows' }, /0 × 3.*leaves rows and columns/],
    ['drop-dependent-rows: a bit was bare before', bareBit, { kind: 'drop-dependent-rows' }, /column 2 without a one/],
    [
      'split-columns: more parts than ones',
      pair,
      { kind: 'split-columns', parts: 2 },
      /parts: got 2.*least weight, 1 at line 0/,
    ],
    ['split-columns: a bit is bare', bareBit, { kind: 'split-columns', parts: 2 }, /least weight, 0 at line 2/],
    ['split-rows: more parts than ones', pair, { kind: 'split-rows', parts: 3 }, /least weight, 2 at line 0/],
    ['mask: all blocks cleared', pair, { kind: 'mask', blockSize: 2, mask: ['00'] }, /column 0 without a one/],
    ['mask: one block column cleared', pair, { kind: 'mask', blockSize: 2, mask: ['10'] }, /column 2 without a one/],
    ['lift: a bit is bare', bareBit, { kind: 'lift', size: 4, girth: 4 }, /column 8 without a one/],
    [
      'superpose: constituents have an empty column',
      pair,
      { kind: 'superpose', constituents: [{ cols: 2, rows: [[0]] }] },
      /column 1 without a one/,
    ],
    [
      'shorten: as many bits as the dimension',
      pair,
      { kind: 'shorten', bits: 2 },
      /bits: got 2; accepted is from 1 to 1/,
    ],
    ['shorten: a code of dimension 0', matrixFromRows(2, [[0], [1]]), { kind: 'shorten', bits: 1 }, /bits: got 1/],
    ['puncture: every bit', pair, { kind: 'puncture', columns: [0, 1, 2, 3] }, /fewer than all 4 columns/],
    [
      'puncture: all checks go with the bits',
      pair,
      { kind: 'puncture', columns: [0, 1] },
      /0 × 2.*leaves rows and columns/,
    ],
    ['puncture: another bit loses its check', pair, { kind: 'puncture', columns: [0] }, /column 1 without a one/],
    ['puncture: a bit that is not there', pair, { kind: 'puncture', columns: [4] }, /columns from 0 to 3/],
    ['transpose: a row that checks nothing', idleRow, { kind: 'transpose' }, /column 2 without a one/],
  ] as [string, SparseMatrix | ReturnType<typeof classed>, Transform, RegExp][])(
    '%s',
    (_what, start, step, message) => {
      const state = 'H' in start ? start : { H: start };
      expect(() => applyTransforms(state, [step])).toThrow(message);
      expect(() => applyTransforms(state, [step])).toThrow(ParamError);
    },
  );

  it('an overall parity bit checks every bit, so it is never refused for one', () => {
    expect(apply(bareBit, { kind: 'extend-by-parity' }).cols).toBe(4);
  });

  it('every kind there is was tried', () => {
    expect([...transformKinds.keys()].sort()).toEqual([
      'drop-dependent-rows',
      'extend-by-parity',
      'keep-classes',
      'lift',
      'mask',
      'puncture',
      'shorten',
      'split-columns',
      'split-rows',
      'superpose',
      'transpose',
    ]);
  });

  it('what any step leaves of any matrix is a code in which every bit is checked, or a typed refusal', () => {
    const steps = fc.constantFrom<Transform>(
      { kind: 'drop-dependent-rows' },
      { kind: 'split-columns', parts: 2 },
      { kind: 'split-rows', parts: 2 },
      { kind: 'mask', blockSize: 1, mask: ['0'] },
      { kind: 'lift', size: 3, girth: 4 },
      { kind: 'superpose', constituents: [{ cols: 2, rows: [[0], [1]] }] },
      { kind: 'shorten', bits: 1 },
      { kind: 'puncture', columns: [0] },
      { kind: 'extend-by-parity' },
      { kind: 'transpose' },
    );
    fc.assert(
      fc.property(sparseMatrices(6, 8), fc.array(steps, { minLength: 1, maxLength: 3 }), (H, list) => {
        let made: SparseMatrix;
        try {
          made = apply(H, ...list);
        } catch (error) {
          expect(error).toBeInstanceOf(ParamError);
          return;
        }
        expect(made.rows).toBeGreaterThan(0);
        expect(new Set(made.colIndex).size).toBe(made.cols);
      }),
      { numRuns: 300 },
    );
  });

  function classed() {
    return { H: pair, rowClasses: Uint32Array.of(0, 1) };
  }
});

describe('the fit of a code to payload and parity, to the bit', () => {
  const plane = { name: 'PG(2,32)', n: 1057, k: 813 };
  const punctured = { name: 'EG(2,32)', n: 1023, k: 781 };
  const sectors: [string, { payloadBits: number; parityBits: number }, string | null][] = [
    ['96 bytes and 244 parity bits', { payloadBits: 768, parityBits: 244 }, 'PG(2,32)'],
    ['96 bytes and 245 parity bits, one by extension', { payloadBits: 768, parityBits: 245 }, 'PG(2,32)'],
    ['64 bytes and 242 parity bits', { payloadBits: 512, parityBits: 242 }, 'EG(2,32)'],
    ['the whole code', { payloadBits: 813, parityBits: 244 }, 'PG(2,32)'],
    ['one bit', { payloadBits: 1, parityBits: 242 }, 'EG(2,32)'],
    ['a payload no code reaches', { payloadBits: 814, parityBits: 300 }, null],
    ['less parity than any code has', { payloadBits: 512, parityBits: 241 }, null],
  ];

  it.each(sectors)('finds the base and the shortening for %s', (_what, sector, name) => {
    const best = rankFits([plane, punctured], sector)[0];
    expect(best?.base.name ?? null).toBe(name);
    if (!best) return;
    expect(best.spareParityBits).toBe(0);
    expect(best.base.k - best.shortenedBits).toBe(sector.payloadBits);
  });

  it('is kept by the matrix that is then built', () => {
    const design = {
      'PG(2,32)': buildDesign({ family: 'projective-plane', params: { q: 32 } }),
      'EG(2,32)': buildDesign({ family: 'punctured-affine-plane', params: { q: 32 } }),
    };
    for (const [what, sector] of sectors.slice(0, 3)) {
      const { base, transforms } = rankFits([plane, punctured], sector)[0]!;
      const { H } = deriveLdpc(design[base.name as keyof typeof design], { checks: 'blocks', transforms });
      expect([H.cols, H.cols - rank(H)], what).toEqual([sector.payloadBits + sector.parityBits, sector.payloadBits]);
    }
  });

  it('says how much parity is left over where it is more than one bit', () => {
    expect(exactFit(plane, { payloadBits: 700, parityBits: 250 })).toMatchObject({
      shortenedBits: 113,
      spareParityBits: 6,
    });
    expect(rankFits([plane, punctured], { payloadBits: 700, parityBits: 250 }).map(({ base }) => base.name)).toEqual([
      'PG(2,32)',
      'EG(2,32)',
    ]);
  });

  it('holds for every base, payload and parity', () => {
    const base = fc
      .integer({ min: 2, max: 5000 })
      .chain((n) => fc.record({ n: fc.constant(n), k: fc.integer({ min: 1, max: n }) }));
    const sector = fc.record({
      payloadBits: fc.integer({ min: 1, max: 5000 }),
      parityBits: fc.integer({ min: 1, max: 5000 }),
    });
    fc.assert(
      fc.property(base, sector, ({ n, k }, { payloadBits, parityBits }) => {
        const fit = exactFit({ n, k }, { payloadBits, parityBits });
        expect(fit === null).toBe(k < payloadBits || n - k > parityBits);
        if (!fit) return;
        const extended = fit.transforms.some(({ kind }) => kind === 'extend-by-parity') ? 1 : 0;
        expect(n - fit.shortenedBits + extended + fit.spareParityBits).toBe(payloadBits + parityBits);
      }),
    );
  });

  it('is asked for in whole positive bits', () => {
    expect(() => exactFit(plane, { payloadBits: 0, parityBits: 10 })).toThrow(/payloadBits: got 0/);
    expect(() => exactFit(plane, { payloadBits: 10, parityBits: 1.5 })).toThrow(/parityBits: got 1.5/);
  });
});
