import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { countCycles } from '../../../../../src/core/codes/analysis/cycles.ts';
import { absorbingSets } from '../../../../../src/core/codes/analysis/sets/absorbing-sets.ts';
import { smallestStoppingSets } from '../../../../../src/core/codes/analysis/sets/stopping-sets.ts';
import { tannerOrbits } from '../../../../../src/core/codes/analysis/tanner-orbits.ts';
import { deriveLdpc } from '../../../../../src/core/codes/ldpc.ts';
import { matrixFromRows, rowOf, type SparseMatrix, transpose } from '../../../../../src/core/codes/sparse-matrix.ts';
import { buildDesign } from '../../../../../src/core/designs/design.ts';
import { circulantMatrix, quasiCyclicMatrix } from '../../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../../models/random-matrices.ts';
import { plainAbsorbingSets, plainStoppingSets } from '../../../../models/set-models.ts';
import planeCodes from '../../../../reference/plane-codes.json' with { type: 'json' };
import published from '../../../../reference/quasi-cyclic-codes.json' with { type: 'json' };

/** Array code (Fan 2000): block (i, j) is the cyclic permutation moved by i·j. */
const arrayCode = (p: number, weight: number) =>
  quasiCyclicMatrix(
    p,
    Array.from({ length: weight }, (_, i) => Array.from({ length: p }, (_, j) => [(i * j) % p])),
  );

const tanner = quasiCyclicMatrix(
  31,
  published['G-tanner155'].value.shifts.map((row) => row.map((x) => [x])),
);

const isStopping = (H: SparseMatrix, set: Uint32Array) =>
  Array.from({ length: H.rows }, (_, r) => rowOf(H, r).filter((c) => set.includes(c)).length).every((d) => d !== 1);

/** Small matrices whose columns have weights 3 to 5. */
const weightThreeToFive = fc
  .integer({ min: 5, max: 8 })
  .chain((rows) =>
    fc
      .array(fc.uniqueArray(fc.nat(rows - 1), { minLength: 3, maxLength: 5 }), { minLength: 3, maxLength: 10 })
      .map((columns) => transpose(matrixFromRows(rows, columns))),
  );

describe('smallest stopping sets', () => {
  it('and their number equal those of trying every set', () => {
    fc.assert(
      fc.property(sparseMatrices(8, 10), (H) => {
        const plain = plainStoppingSets(H);
        const { size, sets, count } = smallestStoppingSets(H, { nodes: 5000 });
        expect(size.value).toEqual({ lower: plain.size, upper: plain.size });
        if (plain.size > 0) expect(count).toBe(plain.count);
        for (const set of sets) expect(isStopping(H, set)).toBe(true);
      }),
      { numRuns: 120 },
    );
  });

  it('of planes of even order are the hyperovals: 168 of size 6 in PG(2,4)', () => {
    const { size, count } = smallestStoppingSets(circulantMatrix(21, [0, 1, 4, 14, 16]), { nodes: 1e5 });
    expect(size.value).toEqual({ lower: 6, upper: 6 });
    expect(count).toBe(planeCodes['A-pg2wd-4'].value[6]);
  });

  it('are enclosed when the budget ends, and those found are stopping sets', () => {
    const { size, sets } = smallestStoppingSets(tanner, { nodes: 2e5 });
    expect(size.grade).toBe('bounded');
    expect(size.value.lower).toBeGreaterThanOrEqual(8);
    expect(sets[0]!.length).toBe(size.value.upper);
    expect(isStopping(tanner, sets[0]!)).toBe(true);
  });

  it('are none when peeling resolves everything', () => {
    const staircase = matrixFromRows(3, [[0], [0, 1], [1, 2]]);
    expect(smallestStoppingSets(staircase, { nodes: 100 }).size.value).toEqual({ lower: 0, upper: 0 });
  });
});

describe('absorbing sets', () => {
  it('and how many are fully absorbing equal those of trying every set', () => {
    fc.assert(
      fc.property(weightThreeToFive, (H) => {
        const { classes, completeTo } = absorbingSets(H, { largest: 5, nodes: 1e6 });
        expect(completeTo.value).toBe(5);
        const found = Object.fromEntries(classes.map((c) => [`${c.a},${c.b}`, [c.count, c.fullyAbsorbing]]));
        expect(found).toEqual(plainAbsorbingSets(H, 5));
      }),
      { numRuns: 120 },
    );
  });

  it.each([5, 7, 11])(
    'of the array code of column weight 3, p = %i: (3,3) are the smallest, (4,2) the smallest fully absorbing ones',
    // Dolecek et al. 2010, Theorem 2, from memory; the counts follow from 6-cycles and pairs of them.
    (p) => {
      const H = arrayCode(p, 3);
      const { classes } = absorbingSets(H, { largest: 4, nodes: 1e6 });
      const orbits = tannerOrbits(H);
      expect(classes[0]).toMatchObject({ a: 3, b: 3, fullyAbsorbing: 0 });
      expect(classes[0]!.count).toBe(countCycles(H, 6, 6, orbits).total.get(6));
      expect(classes.find((c) => c.fullyAbsorbing > 0)).toMatchObject({ a: 4, b: 2, count: (3 * p * p * (p - 1)) / 2 });
    },
  );

  it('of Tanner’s [155, 64] code: none below (4,4), and 155 of size (5,3), as published', () => {
    // Vasić, Chilappagari, Nguyen and Planjery 2009, Trapping set ontology, from memory: 155 (5,3) trapping sets.
    const { classes, completeTo } = absorbingSets(tanner, { largest: 5, nodes: 3e6 });
    expect(completeTo.value).toBe(5);
    expect(classes.map(({ a, b, count }) => [a, b, count])).toEqual([
      [4, 4, 465],
      [5, 3, 155],
      [5, 5, 3720],
    ]);
  });

  it('(4,0) of a triple system are its Pasch configurations', () => {
    const { H } = deriveLdpc(buildDesign({ family: 'projective-geometry', params: { m: 3, q: 2, flat: 1 } }), {
      checks: 'points',
    });
    // PG(3,2) has 105 Pasch configurations: 7 in each of its 15 planes.
    const { classes } = absorbingSets(H, { largest: 4, oddChecks: 0, nodes: 1e6 });
    expect(classes).toMatchObject([{ a: 4, b: 0, count: 105 }]);
  });

  it('are refused for other column weights', () => {
    expect(() => absorbingSets(circulantMatrix(7, [0, 1]), { largest: 3, nodes: 10 })).toThrow(/weights 3 to 5/);
  });
});
