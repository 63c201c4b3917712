import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { approximateTriangularEncoder } from '../../../../src/core/codes/encode/approximate-triangular.ts';
import { checkWords, encoderReport } from '../../../../src/core/codes/encode/encoder-report.ts';
import { parityRegisterEncoder, shiftRegister } from '../../../../src/core/codes/encode/shift-register.ts';
import { systematicCirculants } from '../../../../src/core/codes/encode/systematic-circulants.ts';
import {
  denseEncoder,
  systematicEncoder,
  type WordEncoder,
} from '../../../../src/core/codes/encode/systematic-encoder.ts';
import { triangulate } from '../../../../src/core/codes/encode/triangulate.ts';
import { deriveLdpc, type Transform } from '../../../../src/core/codes/ldpc.ts';
import { matrixFromRows, rowOf, type SparseMatrix, syndrome } from '../../../../src/core/codes/sparse-matrix.ts';
import { buildDesign } from '../../../../src/core/designs/design.ts';
import { BitMatrix } from '../../../../src/core/gf2/bit-matrix.ts';
import { nullableInverse } from '../../../../src/core/gf2/inverse.ts';
import { rank } from '../../../../src/core/gf2/rank.ts';
import { circulantMatrix, plainRank } from '../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../models/random-matrices.ts';
import reference from '../../../reference/quasi-cyclic-codes.json' with { type: 'json' };

const H = (family: string, params: Record<string, number | string>, checks: 'blocks' | 'points', ...t: Transform[]) =>
  deriveLdpc(buildDesign({ family, params }), { checks, transforms: t }).H;

/** Blocks of z by the shifts that each holds. */
function expand(z: number, base: readonly (readonly (readonly number[])[])[]): SparseMatrix {
  const rows = base.flatMap((line) =>
    Array.from({ length: z }, (_, x) => line.flatMap((shifts, b) => shifts.map((s) => b * z + ((x + s) % z)))),
  );
  return matrixFromRows(base[0]!.length * z, rows);
}
const single = (base: readonly (readonly number[])[]) => base.map((line) => line.map((s) => (s < 0 ? [] : [s])));
const tanner = expand(31, single(reference['G-tanner155'].value.shifts));
const nearEarth = expand(511, reference['G-ccsds-c2'].value.first_row_positions);
const wireless = expand(27, single(reference['G-80211n-648-1_2'].value.base));
const irregular = matrixFromRows(12, [
  [0, 1, 2, 3, 4, 5, 6],
  [0, 7],
  [1, 7, 8],
  [2, 8, 9],
  [3, 9, 10],
  [0, 4, 10, 11],
  [0, 1, 7, 8],
  [5, 6, 11],
]);

const codes: [string, () => SparseMatrix][] = [
  ['PG(2,16)', () => H('projective-plane', { q: 16 }, 'blocks')],
  ['EG(2,32) without the origin', () => H('punctured-affine-plane', { q: 32 }, 'blocks')],
  [
    'a triple system of 57 points, blocks as bits',
    () => H('steiner-triple', { v: 57, method: 'random', seed: 'e' }, 'points'),
  ],
  ['a transversal design', () => H('transversal', { k: 4, g: 17 }, 'points')],
  ['a lifted plane', () => H('projective-plane', { q: 3 }, 'blocks', { kind: 'lift', size: 17, girth: 6 })],
  ['a shortened plane', () => H('projective-plane', { q: 8 }, 'blocks', { kind: 'shorten', bits: 10 })],
  ['an irregular matrix with dependent rows', () => irregular],
  ['the code of length 155 by Tanner', () => tanner],
  ['the wireless code of length 648', () => wireless],
  ['the near-earth code of length 8176', () => nearEarth],
];

/** Whether the encoder's words are those of the dense one: the same code by another information set. */
function encodesAs(matrix: SparseMatrix, encoder: WordEncoder, dense: WordEncoder, bits: () => number): void {
  expect(encoder.k).toBe(dense.k);
  const word = encoder.encode(Uint8Array.from({ length: encoder.k }, bits));
  expect(syndrome(matrix, word).includes(1)).toBe(false);
  expect(dense.encode(Uint8Array.from(dense.infoPositions, (c) => word[c]!))).toEqual(word);
}

describe.each(codes)('the encoders of %s', (_name, make) => {
  it('give codewords that show their information, and agree with the systematic one on the code', () => {
    const matrix = make();
    const dense = systematicEncoder({ H: matrix });
    let state = 1;
    const bits = () => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return state >>> 31;
    };
    const triangular = approximateTriangularEncoder(matrix);
    const circulants = systematicCirculants(matrix);
    const register = shiftRegister(matrix);
    for (const encoder of [
      triangular,
      ...('encode' in circulants ? [circulants] : []),
      ...(register ? [parityRegisterEncoder(register)] : []),
    ]) {
      for (let i = 0; i < 5; i++) encodesAs(matrix, encoder, dense, bits);
      expect(checkWords(matrix, encoder, 3, 'again')).toBe(3);
    }
  });
});

describe('the approximate triangle', () => {
  it('of any matrix encodes its code', () => {
    fc.assert(
      fc.property(sparseMatrices(14, 30), fc.infiniteStream(fc.nat(1)), (matrix, stream) => {
        fc.pre(plainRank(matrix) > 0);
        const bits = () => stream.next().value!;
        encodesAs(matrix, approximateTriangularEncoder(matrix), denseEncoder(matrix), bits);
      }),
      { numRuns: 300 },
    );
  });

  it('has in each row one position that neither an earlier row nor the outside has', () => {
    fc.assert(
      fc.property(sparseMatrices(14, 30), (matrix) => {
        const { rows, pivots, gapRows, outside } = triangulate(matrix);
        expect(rows.length + gapRows.length).toBe(matrix.rows);
        expect(pivots.length + outside.length).toBe(matrix.cols);
        const known = new Set(outside);
        rows.forEach((r, i) => {
          expect(rowOf(matrix, r).filter((c) => !known.has(c))).toEqual(Uint32Array.of(pivots[i]!));
          known.add(pivots[i]!);
        });
      }),
      { numRuns: 200 },
    );
  });

  it('leaves gaps far below the parity of practical codes', () => {
    for (const [matrix, most] of [
      [tanner, 5],
      [wireless, 6],
      [codes[0]![1](), 12],
      [nearEarth, 50],
    ] as const) {
      expect(approximateTriangularEncoder(matrix).gap).toBeLessThanOrEqual(most);
    }
  });

  it('of a staircase has no gap', () => {
    const staircase = matrixFromRows(6, [
      [0, 3],
      [1, 3, 4],
      [2, 4, 5],
    ]);
    const { gap, sums } = approximateTriangularEncoder(staircase);
    expect([gap, sums.reduce((a, b) => a + b, 0)]).toEqual([0, 5]);
  });

  it('is refused for a matrix that checks nothing', () => {
    expect(() => approximateTriangularEncoder(matrixFromRows(4, [[]]))).toThrow(/at least one check/);
  });
});

describe('circulant generators', () => {
  it('are found for the wireless code, parity in its last twelve blocks', () => {
    const found = systematicCirculants(wireless);
    expect('parityBlocks' in found && [found.z, found.parityBlocks[0], found.parityBlocks.length]).toEqual([
      27, 12, 12,
    ]);
  });

  it.each([
    ['rank 91 is no multiple of the block size 31', () => tanner, true],
    ['rank 1020 is no multiple of the block size 511', () => nearEarth, true],
    ['the code is cyclic', () => circulantMatrix(21, [0, 1, 4, 14, 16]), true],
    ['does not keep the set of checks', () => irregular, true],
  ] as const)('are refused with the reason: %s', (reason, make, proved) => {
    const found = systematicCirculants(make());
    expect(found).toMatchObject({ reason: expect.stringContaining(reason), proved });
  });

  it('are found wherever some whole blocks have full rank, and nowhere else', () => {
    const shifts = fc.uniqueArray(fc.nat(4), { maxLength: 3 });
    const base = fc
      .tuple(fc.integer({ min: 1, max: 3 }), fc.integer({ min: 2, max: 4 }))
      .chain(([down, across]) =>
        fc.array(fc.array(shifts, { minLength: across, maxLength: across }), { minLength: down, maxLength: down }),
      );
    fc.assert(
      fc.property(base, (blocks) => {
        const z = 5;
        const matrix = expand(z, blocks);
        const found = systematicCirculants(matrix);
        if ('encode' in found) {
          checkWords(matrix, found, 4, 'fuzz');
          return;
        }
        if (!found.reason.includes('block columns')) return;
        const need = rank(matrix) / z;
        const across = blocks[0]!.length;
        for (let choice = 0; choice < 2 ** across; choice++) {
          const chosen = Array.from({ length: across }, (_, b) => b).filter((b) => (choice >> b) & 1);
          if (chosen.length !== need) continue;
          const part = expand(
            z,
            blocks.map((line) => chosen.map((b) => line[b]!)),
          );
          expect(plainRank(part)).toBeLessThan(need * z);
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe('the shift registers of a cyclic code', () => {
  it('of the plane of order 4 have g of degree 10 and h of degree 11 whose product is x^21 + 1', () => {
    const register = shiftRegister(circulantMatrix(21, [0, 1, 4, 14, 16]))!;
    expect([register.n, register.k, register.generator.at(-1), register.parity.at(-1)]).toEqual([21, 11, 10, 11]);
    const product = new Uint8Array(22);
    for (const a of register.generator) for (const b of register.parity) product[a + b]! ^= 1;
    expect(Array.from(product.keys()).filter((i) => product[i])).toEqual([0, 21]);
    expect(register.taps).toEqual(register.generator.slice(1, -1));
  });

  it('of h and of g give the same words', () => {
    const matrix = circulantMatrix(73, [0, 1, 3, 7, 15, 31, 36, 54, 63]);
    const [byParity, byDivision] = [parityRegisterEncoder(shiftRegister(matrix)!), systematicEncoder({ H: matrix })];
    fc.assert(
      fc.property(fc.array(fc.nat(1), { minLength: 45, maxLength: 45 }), (info) => {
        expect(byParity.encode(Uint8Array.from(info))).toEqual(byDivision.encode(Uint8Array.from(info)));
      }),
    );
    expect(() => byParity.encode(new Uint8Array(3))).toThrow(/45 information bits/);
  });
});

describe('the report', () => {
  it('counts the gates and stages of the plane of order 16', () => {
    const { n, k, encoders } = encoderReport({ H: H('projective-plane', { q: 16 }, 'blocks') });
    expect([n, k]).toEqual([273, 191]);
    const [register, circulants, triangular, systematic] = encoders;
    expect(circulants).toMatchObject({ available: false, proved: true });
    if (!register?.available || !triangular?.available || !systematic?.available) throw new Error('missing');
    const g = shiftRegister(H('projective-plane', { q: 16 }, 'blocks'))!.generator.length;
    expect(register.forms[0]).toMatchObject({ xor2: { value: g - 1, grade: 'computed' }, flipFlops: { value: 82 } });
    expect(register.forms[1]).toMatchObject({ flipFlops: { value: 191 }, cycles: { value: 273 } });
    expect(systematic.forms[1]).toMatchObject({ romBits: { value: 191 * 82 }, cycles: { value: 191 } });
    for (const entry of [register, triangular, systematic]) expect(entry.wordsChecked).toBeGreaterThanOrEqual(8);
  });

  it('counts a staircase by hand', () => {
    const staircase = matrixFromRows(6, [
      [0, 3],
      [1, 3, 4],
      [2, 4, 5],
    ]);
    const { encoders } = encoderReport({ H: staircase });
    const triangular = encoders.find(({ kind }) => kind === 'triangular');
    // c3 = c0, c4 = c1 + c3, c5 = c2 + c4: two gates and five terms.
    expect(triangular).toMatchObject({ forms: [{ xor2: { value: 2 } }, { cycles: { value: 5 } }] });
    // The dense rows are c0, c0 + c1 and c0 + c1 + c2.
    expect(encoders.find(({ kind }) => kind === 'systematic')).toMatchObject({ forms: [{ xor2: { value: 3 } }, {}] });
  });

  it('stores first rows of circulants alone: a z-th part of the dense table', () => {
    const { encoders } = encoderReport({ H: wireless });
    const rom = (kind: string, form: number) => {
      const entry = encoders.find((e) => e.kind === kind);
      return entry?.available ? entry.forms[form]!.romBits.value : undefined;
    };
    expect(rom('circulants', 0)! * 27).toBe(rom('systematic', 1));
  });

  it('says what is not there and why, also for a matrix that checks nothing', () => {
    const { k, encoders } = encoderReport({ H: matrixFromRows(4, [[]]) });
    expect(k).toBe(4);
    expect(encoders.find(({ kind }) => kind === 'triangular')).toMatchObject({ available: false });
    expect(() => encoderReport({ H: matrixFromRows(0, []) })).toThrow(/a matrix with columns/);
  });
});

describe('the inverse over GF(2)', () => {
  it('times its matrix is the identity, and is null exactly when the rank falls short', () => {
    const square = fc
      .integer({ min: 1, max: 40 })
      .chain((size) =>
        fc.array(fc.array(fc.nat(1), { minLength: size, maxLength: size }), { minLength: size, maxLength: size }),
      );
    fc.assert(
      fc.property(square, (bits) => {
        const size = bits.length;
        const matrix = new BitMatrix(size, size);
        bits.forEach((row, r) => {
          for (let c = 0; c < size; c++) if (row[c]) matrix.flip(r, c);
        });
        const inverse = nullableInverse(matrix);
        const sparse = matrixFromRows(
          size,
          bits.map((row) => row.flatMap((bit, c) => (bit ? [c] : []))),
        );
        expect(inverse === null).toBe(plainRank(sparse) < size);
        if (!inverse) return;
        for (let r = 0; r < size; r++) {
          for (let c = 0; c < size; c++) {
            let sum = 0;
            for (let i = 0; i < size; i++) sum ^= matrix.get(r, i) & inverse.get(i, c);
            expect(sum).toBe(r === c ? 1 : 0);
          }
        }
      }),
      { numRuns: 60 },
    );
  });
});
