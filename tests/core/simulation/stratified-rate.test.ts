import { describe, expect, it } from 'vitest';
import { ParamError } from '../../../src/core/errors.ts';
import { enumerateStratum } from '../../../src/core/simulation/enumerate-stratum.ts';
import { randomFrom, uniform53 } from '../../../src/core/simulation/random.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';
import { runStratum } from '../../../src/core/simulation/strata.ts';
import { type Stratum, stratifiedCurve, stratifiedRate } from '../../../src/core/simulation/stratified-rate.ts';
import { allocateShards, dominantStrata } from '../../../src/core/simulation/stratum-planning.ts';
import { binomialLaw } from '../../../src/core/statistics/binomial-law.ts';
import { developed, planarDifferenceSets } from '../../reference/difference-sets.ts';

const n = 21;
const H = developed(n, planarDifferenceSets[4].set);
const spec = (p: number) => ({
  H,
  channel: { kind: 'bsc', p } as const,
  decoder: { kind: 'gallager-b' } as const,
  seed: 'strata',
  framesPerShard: 20_000,
});
const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

async function sampledStrata(): Promise<Stratum[]> {
  const strata: Stratum[] = [1, 2].map((weight) => ({ weight, frames: 0, frameErrors: 0, grade: 'proved' }));
  for (let weight = 3; weight <= 8; weight++)
    strata.push({ weight, ...(await runStratum({ ...spec(0.05), framesPerShard: 2000 }, weight, 0)) });
  return strata;
}

describe('the law of the number of errors', () => {
  // mpmath 1.2.1 at 30 digits.
  it.each([
    [273, 0.002, 9, 6.131408901470841e-9],
    [273, 0.0051, 0, 0.24761937683705],
    [4095, 0.001, 60, 7.46743835087176e-48],
  ])('Binomial(%i, %d) at %i', (size, p, w, truth) => {
    expect(relative(binomialLaw(size, p)[w]!, truth)).toBeLessThan(1e-11);
  });

  it('sums to 1 for 70 000 bits', () => {
    expect(Math.abs(binomialLaw(70_000, 0.3).reduce((a, b) => a + b) - 1)).toBeLessThan(1e-9);
  });
});

describe('a rate from strata', () => {
  it('agrees with a direct run where one is possible', async () => {
    const strata = await sampledStrata();
    const direct = await runShard(spec(0.03), 0);
    const { estimate, lower, upper } = stratifiedRate(strata, n, 0.03, 0.95);
    const fer = direct.frameErrors / direct.frames;
    expect(Math.abs(fer - estimate)).toBeLessThan(4 * Math.sqrt(fer / direct.frames) + (upper - lower) / 2);
  });

  it('encloses the exact rate, for frames and for bits', async () => {
    const exact: Stratum[] = [];
    for (let weight = 0; weight <= 8; weight++)
      exact.push({ weight, ...(await enumerateStratum(spec(0.05), weight)), grade: 'computed' });
    const strata = await sampledStrata();
    for (const p of [1e-4, 0.003, 0.02]) {
      const truth = stratifiedRate(exact, n, p, 0.99);
      const bounds = stratifiedRate(strata, n, p, 0.99);
      expect(bounds.lower).toBeLessThanOrEqual(truth.upper);
      expect(bounds.upper).toBeGreaterThanOrEqual(truth.lower);
      expect(bounds.ber!.lower).toBeLessThanOrEqual(truth.ber!.upper);
      expect(bounds.ber!.upper).toBeGreaterThanOrEqual(truth.ber!.lower);
      expect(bounds.ber!.upper).toBeLessThan(bounds.upper);
    }
  });

  it('goes down to 10^-30 with the slope of the lightest failing weight', async () => {
    const strata = await sampledStrata();
    const [high, low] = stratifiedCurve(strata, n, [1e-10, 1e-11], 0.95);
    expect(low!.estimate).toBeLessThan(1e-29);
    expect(low!.estimate).toBeGreaterThan(1e-31);
    expect(relative(high!.estimate / low!.estimate, 1000)).toBeLessThan(1e-6);
    expect(low!.lower).toBeGreaterThan(0);
    expect(low!.upper / low!.lower).toBeLessThan(1.2);
  });

  it('without knowledge of a weight counts it as 0 below and 1 above', () => {
    const [p, w] = [0.01, 3];
    const law = binomialLaw(n, p);
    const strata: Stratum[] = Array.from(
      { length: n + 1 },
      (_, weight): Stratum => ({
        weight,
        frames: 1,
        frameErrors: 0,
        grade: 'computed',
      }),
    ).filter(({ weight }) => weight !== w);
    const { lower, upper } = stratifiedRate(strata, n, p, 0.95);
    expect(lower).toBe(0);
    expect(relative(upper, law[w]!)).toBeLessThan(1e-12);
  });

  it('with nothing known lies between 0 and the probability of any error at all', () => {
    const { lower, upper } = stratifiedRate([], n, 0.01, 0.95);
    expect(lower).toBe(0);
    expect(relative(upper, 1 - 0.99 ** n)).toBeLessThan(1e-12);
  });

  it('has limits that hold together at least as often as they say', () => {
    const shares = [0, 0, 0, 0.02, 0.3, 0.8];
    const random = randomFrom([3, 1, 4, 1]);
    const law = binomialLaw(n, 0.05);
    const known = shares.reduce((sum, share, w) => sum + law[w]! * share, 0);
    const truth = known + law.slice(6).reduce((sum, probability) => sum + probability, 0);
    let covered = 0;
    for (let trial = 0; trial < 300; trial++) {
      const strata = shares.map((share, weight): Stratum => {
        const frames = 200;
        let frameErrors = 0;
        for (let f = 0; f < frames; f++) if (uniform53(random) < share) frameErrors += 1;
        return { weight, frames, frameErrors };
      });
      const { lower, upper } = stratifiedRate(strata, n, 0.05, 0.9);
      if (lower <= truth && truth <= upper) covered += 1;
    }
    expect(covered).toBeGreaterThan(300 * 0.9 - 3 * Math.sqrt(300 * 0.09));
  });

  it('is refused for a weight given twice, a weight over n, counts that cannot be, and p = 0', () => {
    const one: Stratum = { weight: 3, frames: 10, frameErrors: 1 };
    expect(() => stratifiedRate([one, one], n, 0.1, 0.95)).toThrow(ParamError);
    expect(() => stratifiedRate([{ ...one, weight: 22 }], n, 0.1, 0.95)).toThrow(ParamError);
    expect(() => stratifiedRate([{ ...one, frameErrors: 11 }], n, 0.1, 0.95)).toThrow(ParamError);
    expect(() => stratifiedRate([{ ...one, grade: 'proved' }], n, 0.1, 0.95)).toThrow(ParamError);
    expect(() => stratifiedRate([one], n, 0, 0.95)).toThrow(ParamError);
    expect(() => stratifiedRate([one], n, 0.1, 1)).toThrow(ParamError);
  });
});

describe('planning over strata', () => {
  it('names the weight that dominates: the lightest failing one at small p, heavier ones at large p', async () => {
    const strata = await sampledStrata();
    expect(dominantStrata(strata, n, 1e-4, 0.95)[0]!.weight).toBe(3);
    expect(dominantStrata(strata, n, 0.3, 0.95)[0]!.weight).toBeGreaterThan(3);
    const shares = dominantStrata(strata, n, 0.02, 0.95, 30);
    expect(Math.abs(shares.reduce((sum, { upperShare }) => sum + upperShare, 0) - 1)).toBeLessThan(1e-9);
  });

  it('sends the next shards where the interval is widest, and none to what is known exactly', async () => {
    const strata = await sampledStrata();
    const plan = allocateShards(strata, n, 1e-3, 0.95, 10, 5000);
    expect(plan.reduce((sum, { shards }) => sum + shards, 0)).toBe(10);
    expect(plan.find(({ weight }) => weight === 3)!.shards).toBeGreaterThanOrEqual(8);
    expect(plan.some(({ weight }) => weight < 3)).toBe(false);
  });
});
