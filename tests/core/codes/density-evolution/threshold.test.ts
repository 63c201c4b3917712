import { describe, expect, it } from 'vitest';
import { threshold, thresholdOfMatrix } from '../../../../src/core/codes/density-evolution/threshold.ts';
import { circulantMatrix } from '../../../models/gf2-models.ts';
import reference from '../../../reference/thresholds.json' with { type: 'json' };

const entries = (prefix: string) =>
  Object.entries(
    reference as unknown as Record<
      string,
      { parameters: { dv: number; dc: number; b?: number }; value: { threshold: number | string } }
    >,
  ).filter(([id]) => id.startsWith(prefix));

describe('thresholds of cycle-free graphs', () => {
  it("Gallager's algorithms A and B equal an independent evaluation", () => {
    for (const [id, { parameters, value }] of entries('E-gall')) {
      const { dv, dc, b } = parameters;
      const decoder = id.startsWith('E-gallA') ? 'gallager-a' : 'gallager-b';
      const found = threshold({ dv, dc, channel: 'bsc', decoder, flip: b });
      expect(Math.abs(found - Number(value.threshold)), id).toBeLessThan(6e-6);
    }
  });

  it('erasure thresholds hold 12 digits', () => {
    for (const [id, { parameters, value }] of entries('E-bec')) {
      const found = threshold({ ...parameters, channel: 'bec', decoder: 'peeling' });
      expect(Math.abs(found / Number(value.threshold) - 1), id).toBeLessThan(1e-12);
    }
  });

  it('sum-product on the BSC corrects (3,6) up to p = 0.0841', () => {
    expect(Math.abs(threshold({ dv: 3, dc: 6, channel: 'bsc', decoder: 'sum-product' }) - 0.08408)).toBeLessThan(2e-4);
  });

  it('a matrix has the threshold of its degree pair', () => {
    const H = circulantMatrix(21, [0, 1, 4, 14, 16]);
    const question = { channel: 'bsc', decoder: 'gallager-b', flip: 3 } as const;
    expect(thresholdOfMatrix(H, question)).toBeCloseTo(reference['E-gallBfix-5-5-3'].value.threshold, 5);
  });

  it('a decoder that the channel does not have is refused with those it has', () => {
    expect(() => threshold({ dv: 3, dc: 6, channel: 'awgn', decoder: 'gallager-a' })).toThrow(/sum-product/);
    expect(() => threshold({ dv: 1, dc: 6, channel: 'bec', decoder: 'peeling' })).toThrow(/column weight/);
  });
});
