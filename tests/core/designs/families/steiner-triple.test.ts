import { describe, expect, it } from 'vitest';
import { steinerTriple } from '../../../../src/core/designs/families/steiner-triple.ts';
import { countPasches } from '../../../../src/core/designs/pasch.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, ParamError } from '../../../../src/core/errors.ts';
import { plainRank } from '../../../models/binary-rank.ts';
import { triplePaschCounts } from '../../../reference/triple-systems.ts';

describe('steiner-triple', () => {
  it('refuses 8 points by divisibility and names 7 and 9', () => {
    const attempt = () => steinerTriple.parse({ v: 8, method: 'bose' });
    expect(attempt).toThrow(InfeasibleError);
    expect(attempt).toThrow(/v = 8 .*v = 7 and v = 9/);
    try {
      attempt();
    } catch (error) {
      expect(error).toMatchObject({
        rule: 'divisibility',
        param: 'v',
        source: { authors: 'T. P. Kirkman', year: 1847 },
      });
    }
  });

  it('refuses a method on an order it does not reach, naming the one that does', () => {
    expect(() => steinerTriple.parse({ v: 13, method: 'bose' })).toThrow(/takes skolem/);
    expect(() => steinerTriple.parse({ v: 15, method: 'skolem' })).toThrow(/takes bose/);
    expect(() => steinerTriple.parse({ v: 9, method: 'cyclic' })).toThrow(InfeasibleError);
    expect(() => steinerTriple.parse({ v: 13, method: 'anti-pasch' })).toThrow(InfeasibleError);
    expect(() => steinerTriple.parse({ v: 15, method: 'bose', seed: '1' })).toThrow(ParamError);
    expect(() => steinerTriple.parse({ v: 15, method: 'magic' })).toThrow(ParamError);
  });

  it('is a triple system for every v up to 201 by Bose and Skolem', () => {
    for (const params of steinerTriple.enumerate({ maxPoints: 201, maxBlocks: 1e6 })) {
      const design = steinerTriple.build(params);
      expect(verifyDesign(design, { t: 2, lambda: 1 }), JSON.stringify(params)).toMatchObject({ holds: true, k: 3 });
    }
  });

  it('has the rank its prediction proves or bounds, for every v up to 105', () => {
    for (const params of steinerTriple.enumerate({ maxPoints: 105, maxBlocks: 1e6 })) {
      const points = steinerTriple.predict(params).codes.find((c) => c.checks === 'points')!;
      const rank = plainRank(steinerTriple.build(params));
      const { lower, upper } = points.rank.value;
      expect(lower <= rank && rank <= upper, `${JSON.stringify(params)} rank ${rank}`).toBe(true);
      if (params.method !== 'cyclic' && params.method !== 'netto') expect(lower).toBe(upper);
    }
  });

  it('reaches 2,997 and 2,995 points', () => {
    for (const [v, method] of [
      [2997, 'bose'],
      [2995, 'skolem'],
    ] as const) {
      const design = steinerTriple.build(steinerTriple.parse({ v, method }));
      expect(verifyDesign(design, { t: 2, lambda: 1 }).holds).toBe(true);
    }
  });

  it('has the counts of Pasch configurations computed apart for Bose, Skolem, Netto, PG(m,2) and AG(m,3)', () => {
    for (const { v, method, pasch } of triplePaschCounts) {
      expect(countPasches(steinerTriple.build(steinerTriple.parse({ v, method }))), `${method} ${v}`).toBe(pasch);
    }
  });

  it('climbs to a random system that its seed fixes, and to one without any Pasch', () => {
    for (const v of [7, 9, 31, 99, 301]) {
      const one = steinerTriple.build(steinerTriple.parse({ v, method: 'random', seed: 'a' }));
      const again = steinerTriple.build(steinerTriple.parse({ v, method: 'random', seed: 'a' }));
      const other = steinerTriple.build(steinerTriple.parse({ v, method: 'random', seed: 'b' }));
      expect(verifyDesign(one, { t: 2, lambda: 1 }).holds).toBe(true);
      expect(again.blockPoints).toEqual(one.blockPoints);
      if (v > 9) expect(other.blockPoints).not.toEqual(one.blockPoints);
    }
    for (const v of [15, 19, 21, 25, 43, 45, 67, 139, 163, 211, 307, 331]) {
      const sparse = steinerTriple.build(steinerTriple.parse({ v, method: 'anti-pasch', seed: 's1' }));
      expect(verifyDesign(sparse, { t: 2, lambda: 1 }).holds).toBe(true);
      expect(countPasches(sparse)).toBe(0);
    }
  });
});
