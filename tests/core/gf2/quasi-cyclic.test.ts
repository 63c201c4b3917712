import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matrixFromRows, rowOf } from '../../../src/core/codes/sparse-matrix.ts';
import { type QuasiCyclicForm, quasiCyclicForm } from '../../../src/core/gf2/quasi-cyclic.ts';
import { factorise, quasiCyclicRank } from '../../../src/core/gf2/quasi-cyclic-rank.ts';
import { eliminationRank, findRank } from '../../../src/core/gf2/rank.ts';
import { plainRank, quasiCyclicMatrix } from '../../models/gf2-models.ts';
import published from '../../reference/quasi-cyclic-codes.json' with { type: 'json' };

const permutations = (base: readonly (readonly number[])[]) => base.map((row) => row.map((x) => (x < 0 ? [] : [x])));

const tanner = quasiCyclicMatrix(31, permutations(published['G-tanner155'].value.shifts));
const ccsds = quasiCyclicMatrix(511, published['G-ccsds-c2'].value.first_row_positions);
const wireless = quasiCyclicMatrix(27, permutations(published['G-80211n-648-1_2'].value.base));

const bases = fc
  .tuple(fc.integer({ min: 2, max: 40 }), fc.integer({ min: 1, max: 4 }), fc.integer({ min: 2, max: 4 }))
  .chain(([size, rows, blocks]) =>
    fc.tuple(
      fc.constant(size),
      fc.array(fc.array(fc.uniqueArray(fc.nat(size - 1), { maxLength: 3 }), { minLength: blocks, maxLength: blocks }), {
        minLength: rows,
        maxLength: rows,
      }),
    ),
  );

describe('quasi-cyclic matrices', () => {
  it('rank block by block equals plain elimination, for odd and even sizes', () => {
    fc.assert(
      fc.property(bases, ([size, base]) => {
        const H = quasiCyclicMatrix(size, base);
        expect(quasiCyclicRank(quasiCyclicForm(H, size) as QuasiCyclicForm)).toBe(plainRank(H));
      }),
      { numRuns: 150 },
    );
  });

  it.each([
    ['Tanner [155, 64]', tanner, 31, published['G-tanner155'].value.rank_gf2],
    ['CCSDS [8176, 7156]', ccsds, 511, published['G-ccsds-c2'].value.rank_gf2],
    ['802.11 [648, 324]', wireless, 27, published['G-80211n-648-1_2'].value.rank_gf2],
  ])('%s has the published rank, by blocks and by elimination', (_, H, size, rank) => {
    const form = quasiCyclicForm(H) as QuasiCyclicForm;
    expect(form.size).toBe(size);
    expect(quasiCyclicRank(form)).toBe(rank);
    expect(eliminationRank(H)).toBe(rank);
    expect(findRank(H).rank).toBe(rank);
  });

  it('the CCSDS code is ranked by blocks of itself', () => {
    expect(findRank(ccsds).method).toBe('block by block over GF(2)[x]/(x^511 + 1)');
  });

  it('the form is known with rows in any order, and with short orbits', () => {
    const rows = Array.from({ length: 155 }, (_, r) => rowOf(tanner, (r * 7) % 93)).slice(0, 93);
    const form = quasiCyclicForm(matrixFromRows(155, rows)) as QuasiCyclicForm;
    expect([form.size, form.blocks, form.generators.length]).toEqual([31, 5, 3]);
    const short = matrixFromRows(8, [
      [0, 2, 4],
      [1, 3, 5],
      [0, 2, 6],
      [1, 3, 7],
    ]);
    expect(quasiCyclicForm(short, 4)).toMatchObject({ size: 4, generators: { length: 1 } });
    expect(quasiCyclicForm(matrixFromRows(4, [[0, 1], [2]]), 2)).toBeNull();
  });

  it('x^42 + 1 falls into squares of factors of degrees 1, 2, 3 and 6', () => {
    expect(factorise(42)).toEqual({
      power: 2,
      parts: [
        { order: 1, degree: 1, factors: 1 },
        { order: 3, degree: 2, factors: 1 },
        { order: 7, degree: 3, factors: 2 },
        { order: 21, degree: 6, factors: 2 },
      ],
    });
  });
});
