import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type AnalysableCode, analyseLdpc } from '../../../../../src/core/codes/analyse-ldpc.ts';
import { enumerateDistance } from '../../../../../src/core/codes/analysis/distance/brouwer-zimmermann.ts';
import { findDistance } from '../../../../../src/core/codes/analysis/distance/exact-distance.ts';
import { geometryDistance } from '../../../../../src/core/codes/analysis/distance/geometry.ts';
import { weightFourWords } from '../../../../../src/core/codes/analysis/distance/weight-four.ts';
import { girth } from '../../../../../src/core/codes/analysis/girth.ts';
import { tannerOrbits } from '../../../../../src/core/codes/analysis/tanner-orbits.ts';
import { deriveLdpc } from '../../../../../src/core/codes/ldpc.ts';
import { type SparseMatrix, syndrome } from '../../../../../src/core/codes/sparse-matrix.ts';
import { buildDesign } from '../../../../../src/core/designs/design.ts';
import { cyclicGenerators } from '../../../../../src/core/gf2/cyclic.ts';
import { allCodewords, quasiCyclicMatrix } from '../../../../models/gf2-models.ts';
import { sparseMatrices } from '../../../../models/random-matrices.ts';
import published from '../../../../reference/quasi-cyclic-codes.json' with { type: 'json' };
import steinerCodes from '../../../../reference/steiner-codes.json' with { type: 'json' };

const ones = (word: number) => word.toString(2).replaceAll('0', '').length;
const find = ({ H, columnSymmetry }: AnalysableCode, wordOperations: number) => {
  const orbits = tannerOrbits(H, columnSymmetry);
  return findDistance(H, { girth: girth(H, orbits), orbits, cyclic: cyclicGenerators(H) !== null }, { wordOperations });
};
const derived = (family: string, params: Record<string, number | string>, checks: 'blocks' | 'points' = 'blocks') =>
  deriveLdpc(buildDesign({ family, params }), { checks });
const isWord = (H: SparseMatrix, positions: Uint32Array) => {
  const word = new Uint8Array(H.cols);
  for (const c of positions) word[c] = 1;
  return !syndrome(H, word).includes(1);
};

describe('exact distance', () => {
  it('by branching and by enumeration equals that of all words listed', () => {
    fc.assert(
      fc.property(sparseMatrices(10, 13), (H) => {
        const words = allCodewords(H).filter((word) => word !== 0);
        fc.pre(words.length > 0);
        const least = Math.min(...words.map(ones));
        const enumerated = enumerateDistance(H, { wordOperations: 1e7 })!;
        expect([enumerated.lower, enumerated.upper, enumerated.word.length]).toEqual([least, least, least]);
        const found = find({ H }, 1e5)!;
        expect(found.distance.value).toEqual({ lower: least, upper: least });
        if (found.words !== undefined) expect(found.words).toBe(words.filter((word) => ones(word) === least).length);
      }),
      { numRuns: 150 },
    );
  });

  it.each([
    ['projective-geometry', { m: 3, q: 2, flat: 1 }],
    ['projective-geometry', { m: 4, q: 2, flat: 2 }],
    ['affine-geometry', { m: 3, q: 2, flat: 2 }],
    ['affine-geometry', { m: 3, q: 4, flat: 2, origin: 'without' }],
    ['generalised-quadrangle', { kind: 'W', q: 3 }],
    ['generalised-quadrangle', { kind: 'H3', q: 2 }],
  ])('of %s %o is what the theorem says', (family, params) => {
    const code = derived(family, params);
    const value = geometryDistance(code.design, 'blocks')!.value;
    expect(find(code, 2e7)!.distance.value).toEqual({ lower: value, upper: value });
  });

  it('of Tanner’s [155, 64] code encloses the published 20, and ends in an enclosure when the budget does', () => {
    const H = quasiCyclicMatrix(
      31,
      published['G-tanner155'].value.shifts.map((row) => row.map((x) => [x])),
    );
    const { distance, word } = find({ H }, 2e7)!;
    expect(distance.grade).toBe('bounded');
    expect(distance.value.lower).toBeLessThanOrEqual(20);
    expect(distance.value.lower).toBeGreaterThanOrEqual(12);
    expect(distance.value.upper).toBe(published['G-tanner155'].value.dmin_published);
    expect(isWord(H, word)).toBe(true);
  });

  it('an effort is a name or a number of word operations; anything else is refused', () => {
    const code = derived('steiner-triple', { v: 15, method: 'bose' }, 'points');
    expect(analyseLdpc(code, { distance: { wordOperations: 1e7 } }).distance.value).toEqual({ lower: 6, upper: 6 });
    expect(() => analyseLdpc(code, { distance: 'hard' as 'quick' })).toThrow(/"thorough" or \{ wordOperations \}/);
  });
});

describe('words of weight 4', () => {
  it.each([
    [63, steinerCodes['C-bose-63'].value.pasch],
    [51, steinerCodes['C-bose-51'].value.pasch],
  ])('of Bose’s triple system on %i points are its %i Pasch configurations', (v, pasches) => {
    const { H } = derived('steiner-triple', { v, method: 'bose' }, 'points');
    expect(weightFourWords(H, 6)?.value).toBe(pasches);
    if (pasches > 0) expect(find({ H }, 3e7)).toMatchObject({ distance: { value: { lower: 4, upper: 4 } } });
  });
});
