import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ParamError } from '../../../src/core/errors.ts';
import { binomialInterval, zeroErrorUpperLimit } from '../../../src/core/statistics/binomial-interval.ts';
import { gaussianQuantile, studentQuantile } from '../../../src/core/statistics/student.ts';

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe('the Clopper–Pearson interval', () => {
  // Beta quantiles by bisection on mpmath 1.2.1's betainc at 40 digits.
  it.each([
    [1, 100, 0.00025314603297742064, 0.054459385392080645],
    [3, 100, 0.006229971538306394, 0.08517605297428003],
    [50, 100, 0.398321129503301, 0.601678870496699],
    [1, 1e6, 2.5317807663794178e-8, 5.571630655172244e-6],
    [100, 1e6, 8.136470874160142e-5, 0.00012162547857124547],
    [3, 1e9, 6.186721233228958e-10, 8.767273044460698e-9],
    [100, 1e10, 8.136399132266995e-9, 1.216267936609065e-8],
    [1, 1e12, 2.5317807984289554e-14, 5.571643390926163e-12],
    [3, 1e12, 6.186721228960286e-13, 8.767273069717044e-12],
    [100, 1e12, 8.136399125164061e-11, 1.216267937911112e-10],
  ])('of %d in %d at 95 %% is right to 10^-8', (x, n, lower, upper) => {
    const interval = binomialInterval(x, n, 0.95);
    expect(relative(interval.lower, lower)).toBeLessThan(1e-8);
    expect(relative(interval.upper, upper)).toBeLessThan(1e-8);
  });

  it('of none in n has the two-sided upper limit, and the one-sided limit below it', () => {
    const none = binomialInterval(0, 100, 0.95);
    expect(none.lower).toBe(0);
    expect(relative(none.upper, 1 - 0.025 ** (1 / 100))).toBeLessThan(1e-13);
    expect(relative(zeroErrorUpperLimit(1e12, 0.95), 2.995732273553991e-12)).toBeLessThan(1e-11);
    expect(zeroErrorUpperLimit(100, 0.95)).toBeLessThan(binomialInterval(0, 100, 0.95).upper);
  });

  it('of all in n reaches 1', () => {
    expect(binomialInterval(7, 7, 0.9).upper).toBe(1);
    expect(relative(binomialInterval(7, 7, 0.9).lower, 0.05 ** (1 / 7))).toBeLessThan(1e-12);
  });

  it('is the same seen from the failures', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 500 }), fc.double({ min: 0, max: 1, noNaN: true }), (n, share) => {
        const x = Math.round(share * n);
        const one = binomialInterval(x, n, 0.99);
        const other = binomialInterval(n - x, n, 0.99);
        expect(Math.abs(one.lower - (1 - other.upper))).toBeLessThan(1e-9);
      }),
    );
  });

  it('covers the truth at least as often as it says, for every p tried (exact sum over x)', () => {
    const n = 40;
    const intervals = Array.from({ length: n + 1 }, (_, x) => binomialInterval(x, n, 0.9));
    for (const p of [0.001, 0.01, 0.03, 0.1, 0.27, 0.5]) {
      let term = (1 - p) ** n;
      let covered = 0;
      for (let x = 0; x <= n; x++) {
        if (intervals[x]!.lower <= p && p <= intervals[x]!.upper) covered += term;
        term *= ((n - x) / (x + 1)) * (p / (1 - p));
      }
      expect(covered).toBeGreaterThanOrEqual(0.9);
    }
  });

  it('is refused for counts that cannot be, and for a level of 1', () => {
    expect(() => binomialInterval(3, 2, 0.95)).toThrow(ParamError);
    expect(() => binomialInterval(-1, 2, 0.95)).toThrow(ParamError);
    expect(() => binomialInterval(0, 0, 0.95)).toThrow(ParamError);
    expect(() => binomialInterval(1, 2, 1)).toThrow(ParamError);
    expect(() => zeroErrorUpperLimit(0, 0.95)).toThrow(ParamError);
  });
});

describe('quantiles', () => {
  // scipy 1.17 stats.t.ppf and stats.norm.ppf.
  it.each([
    [1, 12.706204736174694],
    [2, 4.302652729749462],
    [10, 2.2281388519862744],
    [1000, 1.9623390808264078],
  ])("Student's t with %i degrees of freedom at 95 %%", (degrees, t) => {
    expect(relative(studentQuantile(0.95, degrees), t)).toBeLessThan(1e-8);
  });

  it('Gaussian at 95 and 99 %', () => {
    expect(relative(gaussianQuantile(0.95), 1.959963984540054)).toBeLessThan(1e-7);
    expect(relative(gaussianQuantile(0.99), 2.5758293035489004)).toBeLessThan(1e-7);
  });
});
