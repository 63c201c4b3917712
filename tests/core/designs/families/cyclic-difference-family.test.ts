import { describe, expect, it } from 'vitest';
import { isPrime, primesUpTo } from '../../../../src/core/algebra/integers.ts';
import { developCyclically } from '../../../../src/core/designs/develop.ts';
import {
  differenceTable,
  isDifferenceFamily,
} from '../../../../src/core/designs/difference-families/difference-table.ts';
import { findDifferenceFamily } from '../../../../src/core/designs/difference-families/find.ts';
import { biplane } from '../../../../src/core/designs/families/biplane.ts';
import { cyclicDifferenceFamily } from '../../../../src/core/designs/families/cyclic-difference-family.ts';
import { cyclicBaseTriples } from '../../../../src/core/designs/triple-systems/peltesohn.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, LimitError } from '../../../../src/core/errors.ts';
import { plainRank } from '../../../models/binary-rank.ts';
import { cyclicFamilies } from '../../../reference/difference-families.ts';

describe('difference families', () => {
  it('published families have a flat difference table and the rank computed apart', () => {
    for (const { v, k, base, rank } of cyclicFamilies) {
      expect(isDifferenceFamily(v, 1, base), `(${v},${k},1)`).toBe(true);
      expect(plainRank(developCyclically(v, base))).toBe(rank);
    }
  });

  it('a table shows which difference is missed', () => {
    expect([...differenceTable(7, [[0, 1, 3]])]).toEqual([0, 1, 1, 1, 1, 1, 1]);
    expect(isDifferenceFamily(7, 1, [[0, 1, 2]])).toBe(false);
  });

  it('Peltesohn’s triples cover every difference once for every admissible v up to 999 but 9', () => {
    for (let v = 7; v <= 999; v++) {
      if (v === 9 || (v % 6 !== 1 && v % 6 !== 3)) continue;
      expect(isDifferenceFamily(v, 1, cyclicBaseTriples(v)), String(v)).toBe(true);
    }
  });

  it('k = 4 and 5 are found for every prime p ≡ 1 (mod k(k − 1)) up to 1,000', () => {
    let found = 0;
    for (const { v, k, lambda } of cyclicDifferenceFamily.enumerate({ maxPoints: 1000, maxBlocks: 1e6 })) {
      if ((k !== 4 && k !== 5) || v <= 100 || !isPrime(v)) continue;
      expect(isDifferenceFamily(v, lambda, findDifferenceFamily(v, k, lambda)!), `(${v},${k})`).toBe(true);
      found++;
    }
    const primes = primesUpTo(1000).filter((p) => p > 100);
    const expected = [12, 20].map((m) => primes.filter((p) => p % m === 1).length);
    expect(found).toBe(expected[0]! + expected[1]!);
  });

  it('composite orders are reached by search and by products', () => {
    for (const [v, k] of [
      [49, 4],
      [85, 4],
      [100, 4],
      [133, 4],
      [169, 4],
      [481, 4],
      [81, 5],
      [85, 5],
    ] as const) {
      expect(isDifferenceFamily(v, 1, findDifferenceFamily(v, k, 1)!), `(${v},${k},1)`).toBe(true);
    }
  });

  it('Singer, twin-prime and fourth-power sets are difference sets', () => {
    for (const [v, k, lambda] of [
      [57, 8, 1],
      [273, 17, 1],
      [40, 13, 4],
      [121, 40, 13],
      [15, 7, 3],
      [35, 17, 8],
      [143, 71, 35],
      [37, 9, 2],
      [109, 28, 7],
    ] as const) {
      expect(isDifferenceFamily(v, lambda, findDifferenceFamily(v, k, lambda)!), `(${v},${k},${lambda})`).toBe(true);
    }
  });

  it('there is no cyclic (25,4,1) family, and the search says only that its budget is spent', () => {
    expect(() => cyclicDifferenceFamily.build(cyclicDifferenceFamily.parse({ v: 25, k: 4, lambda: 1 }))).toThrow(
      LimitError,
    );
  });

  it('parameters whose differences do not divide are refused', () => {
    expect(() => cyclicDifferenceFamily.parse({ v: 9, k: 3, lambda: 1 })).toThrow(InfeasibleError);
    expect(() => cyclicDifferenceFamily.parse({ v: 14, k: 4, lambda: 1 })).toThrow(/v ≡ 1 or 4 \(mod 12\)/);
  });

  it('biplanes with k = 4, 5, 6, 9 hold; 7, 8, 10 are impossible; 11 is not built', () => {
    for (const k of [4, 5, 6, 9]) {
      expect(verifyDesign(biplane.build(biplane.parse({ k })), { t: 2, lambda: 2 }).holds).toBe(true);
    }
    for (const k of [7, 8, 10]) expect(() => biplane.parse({ k })).toThrow(InfeasibleError);
    expect(() => biplane.parse({ k: 11 })).toThrow(LimitError);
  });
});
