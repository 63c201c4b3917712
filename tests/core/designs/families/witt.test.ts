import { describe, expect, it } from 'vitest';
import { witt } from '../../../../src/core/designs/families/witt.ts';
import { verifyDesign } from '../../../../src/core/designs/verify.ts';

describe('Witt designs', () => {
  it.each([
    [11, 4],
    [12, 5],
    [22, 3],
    [23, 4],
    [24, 5],
  ] as const)('on %i points every %i lie in one block', (v, t) => {
    expect(verifyDesign(witt.build(witt.parse({ v })), { t, lambda: 1 }).holds).toBe(true);
  });
});
