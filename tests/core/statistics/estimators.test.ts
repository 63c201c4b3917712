import { describe, expect, it } from 'vitest';
import { ParamError } from '../../../src/core/errors.ts';
import { randomFrom, uniform53 } from '../../../src/core/simulation/random.ts';
import { compareRates } from '../../../src/core/statistics/compare-rates.ts';
import { summariseIterations } from '../../../src/core/statistics/iteration-summary.ts';
import { boundedMeanInterval } from '../../../src/core/statistics/mean-interval.ts';
import { errorsForPrecision, stoppedRate } from '../../../src/core/statistics/stopped-run.ts';

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

/** Runs in shards until `target` errors, at a known rate. */
function runUntil(target: number, rate: number, perShard: number, random: ReturnType<typeof randomFrom>) {
  let [framesBefore, errorsBefore, frames, errors] = [0, 0, 0, 0];
  while (errors < target) {
    [framesBefore, errorsBefore] = [frames, errors];
    for (let f = 0; f < perShard; f++) if (uniform53(random) < rate) errors += 1;
    frames += perShard;
  }
  return { target, framesBefore, errorsBefore, frames, errors };
}

describe('a run stopped on errors', () => {
  it.each([1, 50])('in shards of %i frames is estimated without bias and covered as often as it says', (perShard) => {
    const random = randomFrom([11, 22, 33, perShard]);
    const [rate, target, trials] = [0.05, 10, 1500];
    let sum = 0;
    let covered = 0;
    for (let t = 0; t < trials; t++) {
      const { estimate, lower, upper } = stoppedRate(runUntil(target, rate, perShard, random), 0.9);
      sum += estimate;
      if (lower <= rate && rate <= upper) covered += 1;
    }
    // The standard deviation of (N − 1)/(T − 1) is near p/√(N − 2).
    expect(Math.abs(sum / trials - rate)).toBeLessThan(
      (4 * rate) / Math.sqrt((target - 2) * trials) + 2e-4 * perShard ** 0.5,
    );
    expect(covered / trials).toBeGreaterThan(0.9 - 3 * Math.sqrt(0.09 / trials));
  });

  it('errors over frames, for comparison, is biased upwards', () => {
    const random = randomFrom([1, 1, 2, 3]);
    let sum = 0;
    for (let t = 0; t < 3000; t++) sum += 10 / runUntil(10, 0.05, 1, random).frames;
    expect(sum / 3000).toBeGreaterThan(0.052);
  });

  // Gamma quantiles with scipy 1.17: the least N with both limits within the factor of N − 1.
  it.each([
    [1.1, 424],
    [1.25, 78],
    [1.5, 25],
    [2, 9],
  ])('is within a factor of %d at 95 %% once it stops on %i errors', (factor, errors) => {
    expect(errorsForPrecision(factor, 0.95)).toBe(errors);
  });

  it('is refused when it did not stop on the target', () => {
    const run = { target: 10, framesBefore: 100, errorsBefore: 9, frames: 200, errors: 12 };
    expect(() => stoppedRate({ ...run, errors: 9 }, 0.95)).toThrow(ParamError);
    expect(() => stoppedRate({ ...run, errorsBefore: 10 }, 0.95)).toThrow(ParamError);
    expect(() => stoppedRate({ ...run, target: 1 }, 0.95)).toThrow(ParamError);
    expect(() => errorsForPrecision(1, 0.95)).toThrow(ParamError);
  });
});

describe('two codes compared', () => {
  // scipy 1.17 stats.fisher_exact, two-sided.
  it.each([
    [3, 100, 12, 100, 0.028671314973177094],
    [0, 1000, 7, 1000, 0.015461266199607457],
    [100, 10_000, 130, 10_000, 0.054211885822313725],
    [5, 1_000_000, 20, 2_000_000, 0.20374356759554943],
  ])('%i in %i against %i in %i has the exact p-value', (a, n, b, m, pValue) => {
    const compared = compareRates({ errors: a, frames: n }, { errors: b, frames: m }, 0.95);
    expect(relative(compared.pValue, pValue)).toBeLessThan(1e-9);
    expect(compared.verdict).toBe(pValue < 0.05 ? 'first' : 'undecided');
  });

  it('the ratio has an interval that holds its estimate, and both ends where one has no error', () => {
    const { ratio } = compareRates({ errors: 20, frames: 1000 }, { errors: 10, frames: 1000 }, 0.95);
    expect(ratio.estimate).toBeCloseTo(2, 12);
    expect(ratio.lower).toBeLessThan(2);
    expect(ratio.upper).toBeGreaterThan(2);
    const none = compareRates({ errors: 3, frames: 1000 }, { errors: 0, frames: 1000 }, 0.95);
    expect(none.ratio.upper).toBe(Number.POSITIVE_INFINITY);
    expect(none.ratio.lower).toBeGreaterThan(0);
    expect(none.verdict).toBe('undecided');
  });

  it('says that rates are equal falsely no more often than it may', () => {
    const random = randomFrom([5, 4, 3, 2]);
    const draw = () => {
      let errors = 0;
      for (let f = 0; f < 400; f++) if (uniform53(random) < 0.05) errors += 1;
      return { errors, frames: 400 };
    };
    let decided = 0;
    for (let t = 0; t < 400; t++) if (compareRates(draw(), draw(), 0.95).verdict !== 'undecided') decided += 1;
    expect(decided / 400).toBeLessThan(0.05 + 3 * Math.sqrt(0.0475 / 400));
  });

  it('far apart is decided, with a p-value that is never 0', () => {
    const far = compareRates({ errors: 9000, frames: 10_000 }, { errors: 10, frames: 10_000 }, 0.999);
    expect(far.verdict).toBe('second');
    expect(far.pValue).toBeGreaterThan(0);
    expect(() => compareRates({ errors: 2, frames: 1 }, { errors: 0, frames: 1 }, 0.95)).toThrow(ParamError);
  });
});

describe('a bounded mean', () => {
  it('is covered at least as often as it says, for a lopsided law', () => {
    const random = randomFrom([8, 8, 8, 1]);
    let covered = 0;
    for (let t = 0; t < 300; t++) {
      let [sum, squares] = [0, 0];
      for (let i = 0; i < 100; i++) {
        const x = uniform53(random) < 0.1 ? 0.9 : 0.05;
        sum += x;
        squares += x * x;
      }
      const { lower, upper } = boundedMeanInterval(100, sum, squares, 0.05);
      if (lower <= 0.135 && 0.135 <= upper) covered += 1;
    }
    expect(covered).toBeGreaterThan(270);
  });
});

describe('iterations', () => {
  it('are summed up by mean and quantiles', () => {
    const summary = summariseIterations([50, 30, 15, 4, 0, 1]);
    expect(summary).toEqual({ mean: 0.77, median: 0, p99: 3, p999: 5, largest: 5 });
    expect(() => summariseIterations([0])).toThrow(ParamError);
  });
});
