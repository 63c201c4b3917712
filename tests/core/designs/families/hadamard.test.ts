import { describe, expect, it } from 'vitest';
import { hadamard } from '../../../../src/core/designs/families/hadamard.ts';
import { hadamardIsBuilt, hadamardMatrix } from '../../../../src/core/designs/hadamard-matrix.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, LimitError } from '../../../../src/core/errors.ts';

describe('Hadamard designs', () => {
  it('come from matrices with orthogonal rows for every order reached up to 128', () => {
    for (let n = 4; n <= 128; n += 4) {
      if (!hadamardIsBuilt(n)) continue;
      const H = hadamardMatrix(n)!;
      for (let i = 0; i < n; i++) {
        for (let j = 0; j <= i; j++) {
          let dot = 0;
          for (let c = 0; c < n; c++) dot += H[i * n + c]! * H[j * n + c]!;
          if (dot !== (i === j ? n : 0)) throw new Error(`order ${n}, rows ${i} and ${j}`);
        }
      }
    }
  });

  it('are 2-designs and 3-designs up to order 1,024', () => {
    for (const order of [12, 28, 36, 100, 1024]) {
      const lambda = order / 4 - 1;
      expect(verifyDesign(hadamard.build({ order }), { t: 2, lambda }).holds, String(order)).toBe(true);
      if (order > 200) continue;
      expect(verifyDesign(hadamard.build({ order, t: 3 }), { t: 3, lambda }).holds, String(order)).toBe(true);
    }
  });

  it('refuse order 14, and 92 because it needs another construction', () => {
    expect(() => hadamard.parse({ order: 14 })).toThrow(InfeasibleError);
    expect(() => hadamard.parse({ order: 92 })).toThrow(LimitError);
  });
});
