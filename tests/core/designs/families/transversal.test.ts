import { describe, expect, it } from 'vitest';
import { blockOf } from '../../../../src/core/designs/block-design.ts';
import { transversal } from '../../../../src/core/designs/families/transversal.ts';
import { isResolution } from '../../../../src/core/designs/resolve.ts';
import { coverageOf } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, LimitError } from '../../../../src/core/errors.ts';
import { plainRank } from '../../../models/binary-rank.ts';
import { transversalRanks } from '../../../reference/difference-families.ts';

const build = (k: number, g: number) => transversal.build(transversal.parse({ k, g }));

describe('transversal designs', () => {
  it('two points are on one block exactly when their groups differ', () => {
    for (const [k, g] of [
      [3, 2],
      [4, 3],
      [5, 4],
      [4, 12],
      [4, 15],
      [6, 5],
      [10, 9],
      [3, 6],
      [9, 8],
    ] as const) {
      const { counts, ranking } = coverageOf(build(k, g), 2);
      for (let q = 1; q < k * g; q++) {
        for (let p = 0; p < q; p++) {
          const apart = Math.floor(p / g) !== Math.floor(q / g);
          expect(counts[ranking.terms[1]![q]! + p]).toBe(apart ? 1 : 0);
        }
      }
    }
  });

  it('has the ranks over GF(2) computed apart', () => {
    for (const { k, g, rank } of transversalRanks) expect(plainRank(build(k, g)), `TD(${k},${g})`).toBe(rank);
  });

  it('is resolved unless it uses the group of slopes', () => {
    const design = build(5, 7);
    expect(isResolution(design, design.classes!)).toBe(true);
    expect(build(8, 7).classes).toBeUndefined();
  });

  it('of prime group size is an array of circulants in its own order', () => {
    const design = build(4, 11);
    for (let i = 0; i < design.b; i++) {
      const next = i % 11 === 10 ? i - 10 : i + 1;
      const shifted = Array.from(blockOf(design, i), (p) => p - (p % 11) + ((p + 1 - Math.floor(p / 11) * 11) % 11));
      expect([...blockOf(design, next)]).toEqual(shifted);
    }
  });

  it('refuses more groups than can be, names Tarry for order 6, and states the reach of products', () => {
    expect(() => transversal.parse({ k: 9, g: 7 })).toThrow(InfeasibleError);
    expect(() => transversal.parse({ k: 4, g: 6 })).toThrow(/order 6/);
    expect(() => transversal.parse({ k: 4, g: 10 })).toThrow(LimitError);
  });

  it('reaches 256 groups of 256', () => {
    const design = build(256, 256);
    expect([design.v, design.b]).toEqual([65536, 65536]);
  });
});
