import { describe, expect, it } from 'vitest';
import { automorphismGroup } from '../../../src/core/designs/automorphisms.ts';
import { designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { mapsBlocksOntoThemselves } from '../../../src/core/designs/block-symmetry.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { asymptoticSteinerCount, labelledCopies } from '../../../src/core/designs/design-counts.ts';
import { blockIntersections, intersectionNumbersOf } from '../../../src/core/designs/intersection-numbers.ts';
import { countPasches } from '../../../src/core/designs/pasch.ts';
import { LimitError, ParamError } from '../../../src/core/errors.ts';
import { plainRank } from '../../models/binary-rank.ts';
import { tripleSystems15 } from '../../reference/triple-systems-15.ts';

/** Group orders and, for one block, how many others meet it in each number of points; ids C-sys-* and C-aut-small of
 *  the reference collection, status verified (computed apart). */
const known = [
  { family: 'steiner-triple', params: { v: 7, method: 'skolem' }, order: 168n, meets: { 1: 6 } },
  { family: 'steiner-triple', params: { v: 9, method: 'bose' }, order: 432n, meets: { 0: 2, 1: 9 } },
  { family: 'steiner-triple', params: { v: 27, method: 'affine' }, order: 303264n, meets: { 0: 80, 1: 36 } },
  { family: 'steiner-triple', params: { v: 15, method: 'projective' }, order: 20160n, meets: { 0: 16, 1: 18 } },
  { family: 'steiner-quadruple', params: { v: 8 }, order: 1344n, meets: { 0: 1, 2: 12 } },
  { family: 'steiner-quadruple', params: { v: 10 }, order: 1440n, meets: { 0: 3, 1: 8, 2: 18 } },
  { family: 'projective-plane', params: { q: 3 }, order: 5616n, meets: { 1: 12 } },
  { family: 'projective-plane', params: { q: 4 }, order: 120960n, meets: { 1: 20 } },
  { family: 'witt', params: { v: 12 }, order: 95040n, meets: { 0: 1, 2: 45, 3: 40, 4: 45 } },
  { family: 'witt', params: { v: 22 }, order: 887040n, meets: { 0: 16, 2: 60 } },
  { family: 'witt', params: { v: 24 }, order: 244823040n, meets: { 0: 30, 2: 448, 4: 280 } },
];

describe('automorphism groups and intersection numbers', () => {
  it.each(known)('$family $params has a group of order $order', ({ family, params, order, meets }) => {
    const design = buildDesign({ family, params: params as unknown as Record<string, number | string> });
    const group = automorphismGroup(design);
    expect(group.order).toBe(order);
    for (const g of group.generators) expect(mapsBlocksOntoThemselves(design, g)).toBe(true);
    expect(Object.fromEntries(intersectionNumbersOf(design, 0))).toEqual(meets);
  });

  it('triple systems on 15 points have the orders, Pasch counts and ranks computed apart', () => {
    for (const { aut, pasch, rank, blocks } of tripleSystems15) {
      const design = designFromBlocks(15, blocks);
      expect(automorphismGroup(design).order).toBe(BigInt(aut));
      expect(countPasches(design)).toBe(pasch);
      expect(plainRank(design)).toBe(rank);
    }
  });

  it('all permutations keep the complete design, and more than 64 points are refused', () => {
    const pairs = designFromBlocks(6, [
      [0, 1],
      [0, 2],
      [0, 3],
      [0, 4],
      [0, 5],
      [1, 2],
      [1, 3],
      [1, 4],
      [1, 5],
      [2, 3],
      [2, 4],
      [2, 5],
      [3, 4],
      [3, 5],
      [4, 5],
    ]);
    expect(automorphismGroup(pairs).order).toBe(720n);
    expect(() => automorphismGroup(designFromBlocks(65, [[0, 1]]))).toThrow(LimitError);
  });

  it('pairs of blocks of the plane of order 2 all meet in one point', () => {
    const fano = buildDesign({ family: 'projective-plane', params: { q: 2 } });
    expect([...blockIntersections(fano)]).toEqual([[1, 21]]);
  });
});

describe('counts of designs', () => {
  it('the seven Kirkman systems on 15 points have 15!·13/42 labelled copies in all', () => {
    // Group orders of the seven: entry C-kts15 of the reference collection, status verified.
    const total = [168n, 168n, 24n, 24n, 21n, 12n, 12n].reduce((sum, order) => sum + labelledCopies(15, order), 0n);
    expect(total).toBe((1307674368000n * 13n) / 42n);
    expect(total).toBe(404756352000n);
  });

  it('there are 30 labelled planes of order 2, and an order that does not divide v! is refused', () => {
    expect(labelledCopies(7, 168n)).toBe(30n);
    expect(() => labelledCopies(7, 11n)).toThrow(ParamError);
  });

  it('the estimate for triple systems is (v/e²)^(v²/6) to leading order and is marked asymptotic', () => {
    const { log10, kind } = asymptoticSteinerCount({ t: 2, k: 3, v: 1000 });
    expect(kind).toBe('asymptotic');
    expect(log10 / ((1000 ** 2 / 6) * Math.log10(1000 / Math.E ** 2))).toBeCloseTo(1, 2);
  });
});
