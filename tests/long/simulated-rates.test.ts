import { describe, expect, it } from 'vitest';
import { deviations, referencePoints } from '../reference/simulated-points.ts';

describe('every reference point, with 600 failures or 300 000 frames, within 3.5 standard errors', () => {
  it.each(referencePoints)('$id', async (point) => {
    const most = point.decoder === 'SPA' ? 20_000 : 300_000;
    const frames = Math.min(most, Math.max(3000, Math.ceil(600 / point.fer)));
    const { fer, ber } = await deviations(point, frames, 'wasm');
    expect(Math.abs(fer)).toBeLessThan(3.5);
    expect(Math.abs(ber)).toBeLessThan(3.5);
  });
});
