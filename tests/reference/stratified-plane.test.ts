import { describe, expect, it } from 'vitest';
import { guaranteedRadius } from '../../src/core/simulation/guaranteed-radius.ts';
import type { RunSpec } from '../../src/core/simulation/run-spec.ts';
import { runStratum } from '../../src/core/simulation/strata.ts';
import { provedStrata, type Stratum, stratifiedCurve } from '../../src/core/simulation/stratified-rate.ts';
import { simulatedCodes } from './simulated-codes.ts';

const n = 273;
const spec: RunSpec = {
  H: simulatedCodes.pg16!(),
  channel: { kind: 'bsc', p: 0.01 },
  decoder: { kind: 'bit-flipping', threshold: 10 },
  seed: 'PG(2,16) by strata',
  framesPerShard: 150_000,
};

/** Bit flipping with threshold 10 on PG(2,16), measured before by an independent bit-sliced C++ program: no failure at
 *  weight 8 or less in 22 million frames and more each, φ_9 = 1.2·10^-3, φ_10 = 0.52; direct runs gave the rates below. */
const direct = [
  { p: 0.0051, fer: 1.0e-6 },
  { p: 0.006, fer: 3.9e-6 },
];

describe('PG(2,16) by strata', () => {
  it('has a proved radius of 8, where a C++ program saw no failure, and fails from weight 9 on', async () => {
    expect(guaranteedRadius(spec.H, spec.decoder)!.value).toBe(8);
    expect((await runStratum(spec, 8, 0)).frameErrors).toBe(0);
    const nine = await runStratum(spec, 9, 0);
    const ten = await runStratum(spec, 10, 0);
    expect(nine.frameErrors / nine.frames).toBeGreaterThan(1.05e-3);
    expect(nine.frameErrors / nine.frames).toBeLessThan(1.35e-3);
    expect(Math.abs(ten.frameErrors / ten.frames - 0.52)).toBeLessThan(0.01);
  });

  it('gives from one set of strata the rates that direct runs gave, and 1.8·10^-10 at p = 0.002', async () => {
    const strata: Stratum[] = provedStrata(8);
    for (let weight = 9; weight <= 15; weight++) strata.push({ weight, ...(await runStratum(spec, weight, 0)) });
    const ps = [...direct.map(({ p }) => p), 0.002];
    const rates = stratifiedCurve(strata, n, ps, 0.95);
    direct.forEach(({ fer }, i) => {
      expect(Math.abs(rates[i]!.estimate / fer - 1)).toBeLessThan(0.1);
      expect(rates[i]!.upper / rates[i]!.lower).toBeLessThan(1.1);
    });
    expect(rates[2]!.lower).toBeLessThan(1.8e-10);
    expect(rates[2]!.upper).toBeGreaterThan(1.8e-10);
  });
});
