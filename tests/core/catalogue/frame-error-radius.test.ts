import { expect, test } from 'vitest';
import { leastRadii } from '@/core/catalogue/frame-error-radius.ts';
import { logBinomialTail } from '@/core/statistics/binomial-tail.ts';

test.each([
  [1e-6, 1e-15],
  [1e-3, 1e-9],
  [0.01, 1e-3],
  [0.08, 1e-12],
  [0.49, 1e-6],
])('at p = %s and target %s the radius is the least whose tail reaches the target', (p, target) => {
  const radii = leastRadii(p, target, 70_000);
  for (const n of [1, 2, 10, 63, 273, 1023, 4097, 20_000, 69_999, 70_000]) {
    const w = radii[n]!;
    expect(logBinomialTail(n, p, w)).toBeLessThanOrEqual(Math.log(target) + 1e-8);
    if (w > 0) expect(logBinomialTail(n, p, w - 1)).toBeGreaterThan(Math.log(target) - 1e-8);
  }
});
