import { expect, test } from 'vitest';
import { logBinomialTail } from '@/core/statistics/binomial-tail.ts';
import { logBinomialTerm } from '@/core/statistics/binomial-term.ts';

/** ln P(W > t), summed with 60 decimal digits by Python's decimal module. */
const tails: [n: number, p: number, t: number, ln: number][] = [
  [273, 0.01, 8, -6.250441540025201],
  [273, 0.012, 8, -5.073708760879169],
  [1023, 0.014, 16, -1.303821794115401],
  [1_000_000, 1e-12, 3, -58.44010286220883],
  [1_000_000, 1e-4, 150, -13.60730399692988],
  [70_000, 1e-3, 120, -17.71986950351753],
];

test.each(tails)('the tail of the binomial law with n = %i, p = %d beyond %i', (n, p, t, ln) => {
  expect(Math.abs(logBinomialTail(n, p, t) / ln - 1)).toBeLessThan(1e-12);
});

test('every word has more than −1 errors, and none more than n', () => {
  expect(logBinomialTail(7, 0.1, -1)).toBe(0);
  expect(logBinomialTail(7, 0.1, 7)).toBe(Number.NEGATIVE_INFINITY);
});

test('the terms sum to one, and tails to the sums of their terms', () => {
  for (const [n, p] of [
    [7, 0.01],
    [23, 0.3],
    [273, 0.02],
    [1023, 0.5],
  ] as const) {
    let total = 0;
    for (let w = n; w >= 0; w--) {
      expect(Math.exp(logBinomialTail(n, p, w))).toBeCloseTo(total, 12);
      total += Math.exp(logBinomialTerm(n, w, p));
    }
    expect(total).toBeCloseTo(1, 12);
  }
});
