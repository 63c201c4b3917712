import { describe, expect, it } from 'vitest';
import { steinerTriple } from '../../../../src/core/designs/families/steiner-triple.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, ParamError } from '../../../../src/core/errors.ts';
import { plainRank } from '../../../models/binary-rank.ts';

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
    expect(() => steinerTriple.parse({ v: 15, method: 'magic' })).toThrow(ParamError);
  });

  it('is a triple system for every v up to 201 by Bose and Skolem', () => {
    for (const params of steinerTriple.enumerate({ maxPoints: 201, maxBlocks: 1e6 })) {
      const design = steinerTriple.build(params);
      expect(verifyDesign(design, { t: 2, lambda: 1 }), JSON.stringify(params)).toMatchObject({ holds: true, k: 3 });
    }
  });

  it('has the rank its prediction proves, for every v up to 105', () => {
    for (const params of steinerTriple.enumerate({ maxPoints: 105, maxBlocks: 1e6 })) {
      const points = steinerTriple.predict(params).codes.find((c) => c.checks === 'points')!;
      const rank = plainRank(steinerTriple.build(params));
      expect(points.rank.value, JSON.stringify(params)).toEqual({ lower: rank, upper: rank });
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
});
