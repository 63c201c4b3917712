import { describe, expect, it } from 'vitest';
import { pointAt } from '@/client/curves/curve.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { combinedCurve, LEAST_RATE } from '@/client/strata/combined-curve.ts';
import { isRound, roundCrossovers } from '@/client/strata/round-crossovers.ts';
import { stratumGroups } from '@/client/strata/stratum-groups.ts';
import { knownStrata, weightOf } from '@/core/simulation/known-strata.ts';
import { stratifiedRate } from '@/core/simulation/stratified-rate.ts';
import { strataPoints, stratumPoint } from '../../components/strata/strata-points.ts';

const group = () => stratumGroups(strataPoints())[0]!;
const plan = (stage: number) => ({ stage, frames: 10_000, stream: String(stage) });

describe('the weights of a run', () => {
  it('are grouped apart from its measured points', () => {
    expect(group().points.map(weightOf)).toEqual(Array.from({ length: 16 }, (_, i) => 9 + i));
    expect(groupPoints(strataPoints())).toEqual([]);
  });

  it('leave out a pilot, and count the last stage of each weight', () => {
    const pilot = stratumPoint(9, 5, { id: 'pilot', plan: plan(0) });
    const stages = [1, 2].map((stage) => stratumPoint(9, stage, { id: `stage ${stage}`, plan: plan(stage) }));
    expect(stratumGroups([pilot, ...stages])[0]!.points.map(({ id }) => id)).toEqual(['stage 2']);
    expect(stratumGroups([pilot])).toEqual([]);
  });

  it('count a weight that was tried whole, whatever its stage, unless a shard of it was given up', () => {
    const whole = { ...plan(0), enumerate: { branches: 9, branchesPerShard: 1 } };
    const tried = stratumPoint(9, 5, { id: 'tried', done: true, plan: whole });
    const sample = stratumPoint(9, 1, { id: 'sample', plan: plan(2) });
    const [group] = stratumGroups([sample, tried]);
    expect(group!.points.map(({ id }) => id)).toEqual(['tried']);
    expect(knownStrata(group!, null)[0]!.grade).toBe('computed');
    expect(knownStrata({ n: 273, points: [{ ...tried, setAside: 1 }] }, null)).toEqual([]);
  });
});

describe('what is known of a weight', () => {
  it('is the theorem before the enumeration before the sample', () => {
    const computed = {
      weight: 10,
      frames: 400,
      frameErrors: 3,
      bitErrors: 9,
      bitErrorsSquared: 27,
      grade: 'computed' as const,
    };
    const strata = knownStrata(
      group(),
      9,
      new Map([
        [10, computed],
        [8, { ...computed, weight: 8 }],
      ]),
    );
    const grades = strata.map(({ weight, grade }) => `${weight} ${grade}`);
    expect(grades.slice(0, 12)).toEqual([
      ...Array.from({ length: 10 }, (_, weight) => `${weight} proved`),
      '10 computed',
      '11 sampled',
    ]);
  });

  it('is no sample while the server has enumerated it in part', () => {
    const half = stratumPoint(9, 5, {
      done: false,
      plan: { ...plan(1), enumerate: { branches: 9, branchesPerShard: 1 } },
    });
    expect(knownStrata({ n: 273, points: [half] }, null)).toEqual([]);
    expect(knownStrata({ n: 273, points: [{ ...half, done: true }] }, null)[0]!.grade).toBe('computed');
  });
});

describe('the combined curve', () => {
  const strata = knownStrata(group(), 8);
  const curve = combinedCurve(group(), strata);

  it('reaches from the heaviest weight down past 10^-30 where a radius is proved', () => {
    const last = curve.points.at(-1)!;
    expect(curve.points[0]!.p).toBeCloseTo((1.5 * 24) / 273, 12);
    expect(last.fer.upper).toBeLessThan(LEAST_RATE);
    expect(last.fer.upper).toBeGreaterThan(LEAST_RATE * 1e-12);
  });

  it('falls with p, its estimate within its limits, and is the rate of the engine', () => {
    for (const [i, { p, fer, ber, grade }] of curve.points.entries()) {
      expect(grade).toBe('bounded');
      expect(fer.lower).toBeLessThanOrEqual(fer.value!);
      expect(fer.value!).toBeLessThanOrEqual(fer.upper);
      // Half of the allowance of each weight limits its failing share, the other half its wrong bits.
      expect(ber.upper).toBeLessThanOrEqual(stratifiedRate(strata, 273, p, 0.995).upper * (1 + 1e-12));
      expect(ber.value!).toBeLessThanOrEqual(fer.value!);
      if (i > 0) expect(fer.value!).toBeLessThan(curve.points[i - 1]!.fer.value! * (1 + 1e-9));
      const engine = stratifiedRate(strata, 273, p, 0.99);
      expect(fer).toEqual({ value: engine.estimate, lower: engine.lower, upper: engine.upper });
    }
  });

  it('is known at every p, not only at its points', () => {
    const { estimate } = stratifiedRate(strata, 273, 0.00317, 0.99);
    expect(pointAt(curve, 0.00317)!.fer.value).toBe(estimate);
  });

  it('without frames has no points, whatever is proved', () => {
    expect(combinedCurve(group(), knownStrata({ n: 273, points: [] }, 8)).points).toEqual([]);
  });
});

describe('round values of p', () => {
  it('are 5, 2 and 1 of each decade, as typed', () => {
    expect(roundCrossovers(0.001, 0.06)).toEqual([0.05, 0.02, 0.01, 0.005, 0.002, 0.001]);
    expect([0.05, 2e-7, 0.003].map(isRound)).toEqual([true, true, false]);
  });
});
