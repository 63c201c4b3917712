import { describe, expect, it } from 'vitest';
import { threshold } from '../../src/core/codes/density-evolution/threshold.ts';
import reference from '../reference/thresholds.json' with { type: 'json' };

type Entries = Record<string, { parameters: { dv: number; dc: number }; value: Record<string, number> }>;

describe('soft thresholds of cycle-free graphs', () => {
  for (const [id, { parameters, value }] of Object.entries(reference as unknown as Entries)) {
    if (!id.includes('-bp-')) continue;
    const channel = id.startsWith('E-bsc') ? 'bsc' : 'awgn';
    it(`${channel}, sum-product, (${parameters.dv}, ${parameters.dc}): within the published tolerance`, () => {
      const expected = (value.threshold ?? value.threshold_sigma)!;
      const found = threshold({ ...parameters, channel, decoder: 'sum-product' });
      expect(Math.abs(found - expected)).toBeLessThan(value.tolerance!);
    });
  }

  it('min-sum in Gaussian noise, (3, 6): 1.70 dB, from memory (Chen and Fossorier 2002)', () => {
    const sigma = threshold({ dv: 3, dc: 6, channel: 'awgn', decoder: 'min-sum' });
    expect(-20 * Math.log10(sigma)).toBeCloseTo(1.7, 1);
  });
});
