import stdlibQuantile from '@stdlib/stats-base-dists-beta-quantile';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lowerQuantile, upperQuantile } from '../../../src/core/statistics/beta-quantile.ts';
import { lowerTail, upperTail } from '../../../src/core/statistics/incomplete-beta.ts';

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe('quantiles of the beta law', () => {
  // mpmath 1.3.0: bisection on the regularised betainc at 30 digits.
  it.each([
    [0.025, 1, 100, 0.00025314603297742064, 0.03621669264517642],
    [0.025, 2, 50, 0.004784992694707292, 0.10447489639551716],
    [0.025, 3, 98, 0.006229971538306394, 0.07038393247107012],
    [0.025, 50, 51, 0.398321129503301, 0.5919636708445463],
    [0.025, 100, 1000000, 8.135665436179282e-5, 0.00012051571937285791],
    [0.025, 1000, 100000, 0.009299624809719327, 0.010520738223478416],
    [0.025, 5, 1, 0.4781762498950185, 0.9949492366205319],
    [0.025, 400, 2, 0.9861845714033651, 0.9993954150884942],
    [0.025, 0.5, 3, 0.00017781993293475773, 0.5949531330134034],
    [0.025, 5, 0.5, 0.5904328097973117, 0.9998967717899883],
    [0.025, 50, 0.5, 0.9507638036157275, 0.9999901301319796],
    [0.025, 500, 0.5, 0.9949862134936033, 0.9999990174402084],
    [0.0001, 1, 100, 1.0000495032837455e-6, 0.08798916064409026],
    [0.0001, 2, 50, 0.00028134531468709047, 0.20773199265991946],
    [0.0001, 3, 98, 0.0008701166754722707, 0.13125882461833874],
    [0.0001, 50, 51, 0.31618534678685795, 0.6747266651846066],
    [0.0001, 100, 1000000, 6.70021768169922e-5, 0.00014151310773460069],
    [0.0001, 1000, 100000, 0.008783679381027558, 0.011101299560080696],
    [0.0001, 5, 1, 0.15848931924611134, 0.999979999199952],
    [0.0001, 400, 2, 0.9710723061754036, 0.9999645218559622],
    [0.0001, 0.5, 3, 2.844444455232264e-9, 0.932194973433066],
    [0.0001, 5, 0.5, 0.2058580906159527, 0.9999999983488033],
    [0.0001, 50, 0.5, 0.8588885721165979, 0.9999999998421331],
    [0.0001, 500, 0.5, 0.9849698317841086, 0.9999999999842841],
    [1e-12, 1, 100, 1.000000000000495e-14, 0.24142242497081623],
    [1e-12, 2, 50, 2.8005614491025905e-8, 0.4599974364446915],
    [1e-12, 3, 98, 1.8356194835316628e-6, 0.2911239669359204],
    [1e-12, 50, 51, 0.18469101876022248, 0.8081726101969591],
    [1e-12, 100, 1000000, 4.4882793046216046e-5, 0.0001872211592021557],
    [1e-12, 1000, 100000, 0.007863931564930609, 0.012251516269137423],
    [1e-12, 5, 1, 0.0039810717055349725, 0.9999999999998],
    [1e-12, 400, 2, 0.925285162643151, 0.9999999964688756],
    [1e-12, 0.5, 3, 2.8444444444444443e-25, 0.999852641454562],
    [1e-12, 5, 0.5, 0.005267309227671686, 1.0],
    [1e-12, 50, 0.5, 0.5999669021777569, 1.0],
    [1e-12, 500, 0.5, 0.9504027389785693, 1.0],
  ])('at %d for (%d, %d) are right to 10^-12', (tail, a, b, lower, upper) => {
    expect(relative(lowerQuantile(tail, a, b), lower)).toBeLessThan(1e-12);
    expect(relative(upperQuantile(tail, a, b), upper)).toBeLessThan(1e-12);
  });

  it('agree with those of stdlib, which take the other tail as 1 − tail, as far as that keeps its digits', () => {
    const size = fc.double({ min: 0, max: 6, noNaN: true }).map((log) => Math.ceil(10 ** log));
    const tail = fc.double({ min: 0.001, max: 0.5, noNaN: true });
    fc.assert(
      fc.property(tail, size, size, (tail, a, b) => {
        expect(relative(lowerQuantile(tail, a, b), stdlibQuantile(tail, a, b))).toBeLessThan(1e-8);
        expect(relative(upperQuantile(tail, a, b), stdlibQuantile(1 - tail, a, b))).toBeLessThan(1e-8);
      }),
      { numRuns: 500 },
    );
  });

  it('leave the tail that was asked for, up to a + b = 10^15 and for tails of 10^-30', () => {
    for (const [a, b] of [
      [1, 1e15],
      [100, 1e15],
      [1e6, 1e9],
      [5e8, 5e8],
      [2, 3],
    ] as const) {
      for (const tail of [0.5, 0.025, 1e-9, 1e-30]) {
        expect(Math.exp(lowerTail(a, b, lowerQuantile(tail, a, b)).log) / tail).toBeCloseTo(1, 6);
        expect(Math.exp(upperTail(a, b, upperQuantile(tail, a, b)).log) / tail).toBeCloseTo(1, 6);
      }
    }
  });
});
