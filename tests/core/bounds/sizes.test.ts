import { describe, expect, it } from 'vitest';
import { johnsonBound, johnsonPackingBound, refinedJohnsonBound } from '../../../src/core/bounds/johnson-bound.ts';
import { schonheimBound } from '../../../src/core/bounds/schonheim-bound.ts';
import reference from '../../reference/constant-weight-sizes.json' with { type: 'json' };

const entries = (prefix: string) =>
  Object.entries(reference as Record<string, { parameters: Record<string, number>; value: unknown }>).filter(([id]) =>
    id.startsWith(prefix),
  );

describe('bounds on sets of words of one weight', () => {
  it('the three forms of the Johnson bound equal an independent evaluation', () => {
    for (const [n, d, w, first, both, refined] of reference['D-johnson-table'].value as number[][]) {
      expect([johnsonPackingBound(n!, d!, w!), johnsonBound(n!, d!, w!), refinedJohnsonBound(n!, d!, w!)]).toEqual([
        first,
        both,
        refined,
      ]);
    }
  });

  it('no published size passes the Johnson bound, and Steiner systems meet it', () => {
    for (const [id, { parameters, value }] of entries('D-A-')) {
      const { n, d, w, t } = parameters as { n: number; d: number; w: number; t?: number };
      expect(johnsonBound(n, d, w), id).toBeGreaterThanOrEqual(value as number);
      if (t !== undefined) expect(johnsonPackingBound(n, d, w), id).toBe(value);
    }
  });

  it('A(13, 4, 3) is at most 26', () => {
    expect(johnsonBound(13, 4, 3)).toBe(26);
  });

  it('the Schönheim bound equals published values', () => {
    for (const [id, { parameters, value }] of [...entries('D-cov-'), ...entries('D-sch-')]) {
      const { v, k, t } = parameters as { v: number; k: number; t: number };
      const expected = typeof value === 'number' ? value : (value as { schonheim: number }).schonheim;
      expect(schonheimBound(v, k, t), id).toBe(expected);
    }
  });
});
