import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyseLdpc } from '../../../../../src/core/codes/analyse-ldpc.ts';
import { searchLowWeight } from '../../../../../src/core/codes/analysis/distance/low-weight-search.ts';
import { treeBound } from '../../../../../src/core/codes/analysis/distance/tree-bound.ts';
import { weightDistribution } from '../../../../../src/core/codes/analysis/distance/weight-distribution.ts';
import { syndrome } from '../../../../../src/core/codes/sparse-matrix.ts';
import { allCodewords, circulantMatrix } from '../../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../../models/random-matrices.ts';
import planeCodes from '../../../../reference/plane-codes.json' with { type: 'json' };

const plane16 = circulantMatrix(273, planeCodes['B-pds-16'].value.canonical);
const ones = (word: number) => word.toString(2).replaceAll('0', '').length;

describe('weight distribution', () => {
  it('equals that of all words listed', () => {
    fc.assert(
      fc.property(sparseMatrices(10, 12), (H) => {
        const expected = new Map<number, bigint>();
        for (const word of allCodewords(H)) expected.set(ones(word), (expected.get(ones(word)) ?? 0n) + 1n);
        expect(weightDistribution(H).counts).toEqual(new Map([...expected].sort(([a], [b]) => a - b)));
      }),
      { numRuns: 150 },
    );
  });

  it('of PG(2,4) is the published one, through the dual', () => {
    const { counts, method } = weightDistribution(circulantMatrix(21, [0, 1, 4, 14, 16]));
    expect(method).toMatch(/MacWilliams/);
    expect(Object.fromEntries(Array.from(counts, ([w, c]) => [w, Number(c)]))).toEqual(planeCodes['A-pg2wd-4'].value);
  });

  it('is refused when code and dual are both too large', () => {
    expect(() => weightDistribution(plane16)).toThrow(/limit here is 26/);
  });
});

describe('distance', () => {
  it('of PG(2,16) is 18: q + 2 below, a word found above', () => {
    const { distance } = analyseLdpc({ H: plane16 }, { cycles: false });
    expect(distance.value.lower).toBe(18);
    expect(distance.value.upper).toBe(18);
  });

  it('found words satisfy every check, and the same seed finds the same', () => {
    const options = { seed: 'tide', wordOperations: 2e6 };
    const found = searchLowWeight(plane16, options)!;
    const word = new Uint8Array(273);
    for (const c of found.positions) word[c] = 1;
    expect(found.positions.length).toBe(found.weight);
    expect(syndrome(plane16, word).some((s) => s === 1)).toBe(false);
    expect(searchLowWeight(plane16, options)).toEqual(found);
  });

  it('lower bounds never pass the distance of small codes', () => {
    fc.assert(
      fc.property(sparseMatrices(10, 12), (H) => {
        const words = allCodewords(H).filter((word) => word !== 0);
        fc.pre(words.length > 0);
        const least = Math.min(...words.map(ones));
        const { value } = analyseLdpc({ H }, { cycles: false, distance: 'theorems' }).distance;
        expect(value.lower).toBeLessThanOrEqual(least);
        expect(value.upper).toBeGreaterThanOrEqual(least);
        expect(analyseLdpc({ H }, { cycles: false }).distance.value).toEqual({ lower: least, upper: least });
      }),
      { numRuns: 150 },
    );
  });

  it('tree bound: column weight + 1 at girth 6, twice the weight at girth 8', () => {
    expect([treeBound(6, 5).value, treeBound(8, 4).value, treeBound(4, 3).value]).toEqual([6, 8, 2]);
  });
});
