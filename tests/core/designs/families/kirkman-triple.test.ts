import { describe, expect, it } from 'vitest';
import { kirkmanTriple } from '../../../../src/core/designs/families/kirkman-triple.ts';
import { isResolution } from '../../../../src/core/designs/resolve.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';
import { InfeasibleError, LimitError } from '../../../../src/core/errors.ts';

describe('Kirkman triple systems', () => {
  it('exist with their classes for every v ≡ 3 (mod 6) from 9 to 99', () => {
    for (let v = 9; v <= 99; v += 6) {
      const design = kirkmanTriple.build(kirkmanTriple.parse({ v }));
      expect(verifyDesign(design, { t: 2, lambda: 1 }).holds, String(v)).toBe(true);
      expect(isResolution(design, design.classes!), String(v)).toBe(true);
    }
  });

  it('refuse 13 by divisibility and 105 by the limit', () => {
    expect(() => kirkmanTriple.parse({ v: 13 })).toThrow(InfeasibleError);
    expect(() => kirkmanTriple.parse({ v: 13 })).toThrow(/v = 9 and v = 15/);
    expect(() => kirkmanTriple.parse({ v: 105 })).toThrow(LimitError);
  });
});
