import { describe, expect, it } from 'vitest';
import { limitVerdict, planStage, stageLevel, weightsToSample } from '../../../src/core/simulation/limit-planning.ts';
import { randomFrom, uniform53 } from '../../../src/core/simulation/random.ts';
import { expectedFrames, sequentialVerdict } from '../../../src/core/simulation/sequential-test.ts';
import { stoppingReason } from '../../../src/core/simulation/stopping.ts';
import { provedStrata, stratifiedRate } from '../../../src/core/simulation/stratified-rate.ts';
import { nextSweepPoint, type SweptPoint } from '../../../src/core/simulation/sweep-planning.ts';
import { emptyTally } from '../../../src/core/simulation/tally.ts';

/** A waterfall: FER = min(1, (p/0.03)^8). */
const ferAt = (p: number) => Math.min(1, (p / 0.03) ** 8);
const rule = { frameErrors: 100, maxFrames: 1e7 };

describe('an adaptive sweep', () => {
  it('starts at the worse end, steps down about a decade at a time and fills the widest gaps', () => {
    const goal = { from: 0.03, to: 0.002, points: 14 };
    const points: SweptPoint[] = [];
    for (let p = nextSweepPoint(points, goal, rule); p !== null; p = nextSweepPoint(points, goal, rule)) {
      const frames = Math.min(rule.maxFrames, rule.frameErrors / ferAt(p));
      points.push({ p, frames, frameErrors: Math.floor(frames * ferAt(p)), done: true });
    }
    const ps = points.map(({ p }) => p);
    expect(ps[0]).toBe(0.03);
    const walk = ps.slice(0, ps.indexOf(Math.min(...ps)) + 1);
    expect(walk.every((p, i) => i === 0 || p < walk[i - 1]!)).toBe(true);
    const decades = walk.slice(2).map((p, i) => Math.log10(ferAt(walk[i + 1]!) / ferAt(p)));
    for (const decade of decades) expect(decade).toBeLessThan(1.1);
    // No point at which the frames allowed would show no error.
    expect(ferAt(Math.min(...ps)) * rule.maxFrames).toBeGreaterThan(0.5);
    expect(points.length).toBeLessThanOrEqual(14);
  });

  it('waits for the point under way', () => {
    const point = { p: 0.03, frames: 100, frameErrors: 50, done: false };
    expect(nextSweepPoint([point], { from: 0.03, to: 0.002, points: 5 }, rule)).toBeNull();
  });
});

describe('a limit by weights', () => {
  const goal = { n: 273, p: 1e-3, target: 191e-15, level: 0.95 };
  const known = provedStrata(8);

  it('samples the weights beyond the proved radius up to where the rest hardly matters', () => {
    const weights = weightsToSample(known, goal);
    expect(weights[0]).toBe(9);
    expect(weights.length).toBeLessThan(20);
  });

  it('plans frames after which, if they go as before, the verdict stands', () => {
    const prior = weightsToSample(known, goal).map((weight) => ({ weight, frames: 1000, frameErrors: 0 }));
    const level = stageLevel(goal.level, 1);
    const plan = planStage(known, prior, goal, { level, framesPerShard: 1000, maxFrames: 1e9 });
    expect(plan.isEnough).toBe(true);
    const strata = plan.strata.map(({ weight, frames }) => ({ weight, frames, frameErrors: 0 }));
    const verdict = limitVerdict([...known, ...strata], goal, level);
    expect(verdict.verdict).toBe('pass');
    expect(verdict.upper).toBe(stratifiedRate([...known, ...strata], goal.n, goal.p, level).upper);
    // Fewer by a factor of ten would not do.
    const tenth = strata.map((stratum) => ({ ...stratum, frames: stratum.frames / 10 }));
    expect(limitVerdict([...known, ...tenth], goal, level).verdict).toBeNull();
  });

  it('says when the frames allowed are too few', () => {
    const plan = planStage(
      known,
      [],
      { ...goal, target: 1e-15 },
      { level: 0.975, framesPerShard: 100, maxFrames: 5000 },
    );
    expect(plan.isEnough).toBe(false);
    expect(plan.expected).toBeGreaterThan(1e-15);
  });

  it('spends the chance of error over its stages, all together no more than was stated', () => {
    const spent = Array.from({ length: 20 }, (_, i) => 1 - stageLevel(0.95, i + 1)).reduce((a, b) => a + b);
    expect(spent).toBeLessThan(0.05);
  });
});

describe('a sequential test', () => {
  const test = { limit: 0.02, ratio: 2, falsePass: 0.05, falseFail: 0.05 };

  it('errs no more often than stated, at either end', () => {
    const generator = randomFrom([1, 2, 3, 7]);
    const random = () => uniform53(generator);
    const wrong = (rate: number, verdict: 'pass' | 'fail') => {
      let count = 0;
      for (let trial = 0; trial < 400; trial++) {
        let frames = 0;
        let frameErrors = 0;
        let said: string | null = null;
        while (said === null) {
          for (let i = 0; i < 50; i++) if (random() < rate) frameErrors++;
          frames += 50;
          said = sequentialVerdict({ frames, frameErrors }, test);
        }
        if (said === verdict) count++;
      }
      return count / 400;
    };
    expect(wrong(test.limit, 'pass')).toBeLessThan(0.075);
    expect(wrong(test.limit / test.ratio, 'fail')).toBeLessThan(0.075);
  });

  it('is over sooner the clearer the case', () => {
    expect(expectedFrames(0.0001, test)).toBeLessThan(expectedFrames(0.01, test));
    expect(expectedFrames(0.1, test)).toBeLessThan(expectedFrames(0.02, test));
  });

  it('and a width end a point for their own reasons', () => {
    const tally = { ...emptyTally(), frames: 10_000, frameErrors: 900 };
    expect(stoppingReason(tally, { maxFrames: 1e6, verdict: test })).toBe('fail');
    expect(stoppingReason(tally, { maxFrames: 1e6, width: { factor: 1.1, level: 0.95 } })).toBe('width');
    expect(stoppingReason(tally, { maxFrames: 1e6, width: { factor: 1.01, level: 0.95 } })).toBeNull();
  });
});
