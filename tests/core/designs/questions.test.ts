import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { transpose } from '../../../src/core/codes/sparse-matrix.ts';
import { type BlockDesign, type DesignSpec, designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { families } from '../../../src/core/designs/families/index.ts';
import { blockIntersections, intersectionNumbersOf } from '../../../src/core/designs/intersection-numbers.ts';
import { incidenceMatrix, type OpenedDesign, openDesign } from '../../../src/core/designs/open-design.ts';
import { designQuestions } from '../../../src/core/designs/questions/index.ts';
import { outlineOf } from '../../../src/core/designs/questions/question.ts';

const clock = () => 0;
const open = (family: string, params: DesignSpec['params']) =>
  openDesign({ kind: 'spec', spec: { family, params } }, { clock });
const counted = (opened: OpenedDesign) => Object.fromEntries(blockIntersections(opened.design));

/** Block by block, each pair twice. */
function plainIntersections(design: BlockDesign): Record<number, number> {
  const twice: Record<number, number> = {};
  for (let i = 0; i < design.b; i++)
    for (const [size, count] of intersectionNumbersOf(design, i)) twice[size] = (twice[size] ?? 0) + count;
  return Object.fromEntries(Object.entries(twice).map(([size, count]) => [size, count / 2]));
}

describe('block intersections', () => {
  test('counted over the points agree with the plain count of any blocks', () => {
    const lists = fc
      .integer({ min: 1, max: 9 })
      .chain((v) =>
        fc.tuple(fc.constant(v), fc.array(fc.subarray(Array.from({ length: v }, (_, i) => i)), { maxLength: 14 })),
      );
    fc.assert(
      fc.property(lists, ([v, blocks]) => {
        const design = designFromBlocks(v, blocks);
        expect(Object.fromEntries(blockIntersections(design))).toEqual(plainIntersections(design));
      }),
    );
  });

  test.each<[string, DesignSpec['params'], Record<number, number>]>([
    ['projective-plane', { q: 4 }, { 1: 210 }],
    ['witt', { v: 24 }, { 0: 11385, 2: 170016, 4: 106260 }],
    ['steiner-quadruple', { v: 10 }, { 0: 45, 1: 120, 2: 270 }],
    ['quadratic-residue', { q: 11 }, { 2: 55 }],
    ['generalised-quadrangle', { kind: 'W', q: 2 }, { 0: 60, 1: 45 }],
  ])('of %s %j are settled by a theorem that the count confirms', (family, params, expected) => {
    const opened = open(family, params);
    const { value, grade, method } = designQuestions.intersections.answer(opened, {});
    expect([grade, method.length > 0]).toEqual(['proved', true]);
    expect(Object.fromEntries(value)).toEqual(counted(opened));
    expect(Object.fromEntries(value)).toEqual(expected);
  });

  test('without a theorem are counted', () => {
    const opened = open('projective-geometry', { m: 3, q: 2, flat: 2 });
    const biplane = open('complement', { of: { family: 'affine-plane', params: { q: 3 } } });
    expect(designQuestions.intersections.answer(opened, {}).grade).toBe('proved');
    const told: number[] = [];
    const answer = designQuestions.intersections.answer(biplane, { onProgress: (share) => told.push(share) });
    expect(answer).toMatchObject({ grade: 'computed', value: [...blockIntersections(biplane.design)] });
    expect(told.length).toBeGreaterThan(0);
  });
});

describe('resolutions', () => {
  test('are the construction’s own where it gives one, checked', () => {
    const answer = designQuestions.resolution.answer(open('kirkman-triple', { v: 15 }), {});
    expect(answer).toMatchObject({ resolvable: { value: 'yes', grade: 'computed' }, classCount: 7 });
  });

  test('are ruled out by Bose’s inequality without a search', () => {
    const hadamard = open('projective-geometry', { m: 3, q: 2, flat: 2 });
    const complement = open('complement', { of: { family: 'quadratic-residue', params: { q: 7 } } });
    for (const opened of [hadamard, complement]) {
      const { resolvable, nodes } = designQuestions.resolution.answer(opened, {});
      expect([resolvable.value, resolvable.grade, nodes]).toEqual(['no', 'proved', 0]);
    }
  });

  test('stay undecided when the budget ends, and the answer says that this proves nothing', () => {
    const { resolvable } = designQuestions.resolution.answer(open('steiner-triple', { v: 99, method: 'bose' }), {
      limit: 200,
    });
    expect(resolvable).toMatchObject({ value: 'undecided', grade: 'bounded' });
    expect(resolvable.method).toContain('of 200; this proves nothing');
  });
});

describe('other questions', () => {
  test('PG(2,16) has 2-rank 82, as its formula says', () => {
    const { rank, formula } = designQuestions.twoRank.answer(open('projective-plane', { q: 16 }), {});
    expect([rank.value, rank.grade, formula?.value]).toEqual([82, 'computed', { lower: 82, upper: 82 }]);
  });

  test('the Fano plane has group order 168, so 30 labelled copies, and seven Pasches', () => {
    const fano = open('projective-plane', { q: 2 });
    const { order, copies } = designQuestions.automorphisms.answer(fano, {});
    expect([order.value, copies.value]).toEqual([168n, 30n]);
    expect(designQuestions.pasches.answer(fano, {}).value).toBe(7);
  });

  test('one that does not fit says what would', () => {
    const plane = outlineOf(open('projective-plane', { q: 8 }));
    expect(designQuestions.pasches.obstacle(plane)).toBe('asked of blocks of three points');
    expect(designQuestions.automorphisms.obstacle(plane)).toBe('asked of up to 64 points');
    expect(designQuestions.designCount.obstacle(plane)).toBeNull();
    const quadrangle = outlineOf(open('generalised-quadrangle', { kind: 'W', q: 2 }));
    expect(designQuestions.designCount.obstacle(quadrangle)).toContain('λ = 1');
    expect(designQuestions.pasches.obstacle(quadrangle)).toBeNull();
  });
});

describe('a design is opened', () => {
  test('from the example of every family, with a certificate that holds', () => {
    for (const { id, params } of families) {
      const example = Object.fromEntries(
        params
          .filter(({ optional }) => !optional)
          .map(({ name, example, kind }) => [name, kind === 'spec' ? JSON.parse(String(example)) : example]),
      );
      const steps: string[] = [];
      const opened = openDesign(
        { kind: 'spec', spec: { family: id, params: example } },
        { clock, onStep: (step) => steps.push(step) },
      );
      expect([id, opened.certificate.holds, steps]).toEqual([id, true, ['build', 'verify']]);
      expect(outlineOf(opened).k).toBe(opened.certificate.k);
    }
  });

  test('with its own parallel classes checked, where the construction gives them', () => {
    expect(open('affine-plane', { q: 4 }).isResolved).toBe(true);
    expect(open('projective-plane', { q: 4 }).isResolved).toBe(false);
  });

  test('from a matrix by rows or by columns, for the largest t that holds', () => {
    const { design } = open('witt', { v: 12 });
    const H = incidenceMatrix(design);
    for (const source of [
      { H, blocksAre: 'rows' },
      { H: transpose(H), blocksAre: 'columns' },
    ] as const) {
      const opened = openDesign({ kind: 'matrix', ...source }, { clock });
      expect(opened.claim).toEqual({ t: 5, lambda: 1, partialLinear: false });
      expect(opened.design.blockPoints).toEqual(design.blockPoints);
    }
  });
});
