import { describe, expect, it } from 'vitest';
import { steinerQuadruple } from '../../../../src/core/designs/families/steiner-quadruple.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError } from '../../../../src/core/errors.ts';
import { plainRank } from '../../../models/binary-rank.ts';

describe('Steiner quadruple systems', () => {
  it('exist for every v ≡ 2, 4 (mod 6) from 8 to 46', () => {
    for (let v = 8; v <= 46; v += 2) {
      if (v % 6 === 0) continue;
      const design = steinerQuadruple.build(steinerQuadruple.parse({ v }));
      expect(verifyDesign(design, { t: 3, lambda: 1 }).holds, String(v)).toBe(true);
    }
  });

  it('have the rank of the Boolean system on 32 points, 26 (C-sys-S(3,4,32)boolean, computed apart)', () => {
    expect(plainRank(steinerQuadruple.build({ v: 32 }))).toBe(26);
  });

  it('refuse 12 by divisibility', () => {
    expect(() => steinerQuadruple.parse({ v: 12 })).toThrow(InfeasibleError);
  });
});
