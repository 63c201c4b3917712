import { expect, it } from 'vitest';
import { steinerQuadruple } from '../../src/core/designs/families/steiner-quadruple.ts';
import { verifyDesign } from '../../src/core/designs/verify.ts';

it('Steiner quadruple systems exist for every v ≡ 2, 4 (mod 6) from 8 to 100', () => {
  for (let v = 8; v <= 100; v += 2) {
    if (v % 6 === 0) continue;
    const design = steinerQuadruple.build(steinerQuadruple.parse({ v }));
    expect(verifyDesign(design, { t: 3, lambda: 1 }).holds, String(v)).toBe(true);
  }
});
