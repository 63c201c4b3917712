import { describe, expect, it } from 'vitest';
import { deviations, referencePoints } from './simulated-points.ts';

/** Frames that make about 150 failures, within what a test may take. */
const framesFor = (fer: number, most: number) => Math.min(most, Math.max(2000, Math.ceil(150 / fer)));

describe('hard-decision rates meet an independent program within 3.5 standard errors', () => {
  it.each(referencePoints.filter(({ decoder }) => decoder !== 'SPA'))('$id', async (point) => {
    const { fer, ber } = await deviations(point, framesFor(point.fer, 100_000), 'wasm');
    expect(Math.abs(fer)).toBeLessThan(3.5);
    expect(Math.abs(ber)).toBeLessThan(3.5);
  });
});

describe('readable decoders meet an independent program within 3.5 standard errors', () => {
  const short = referencePoints.filter(({ code, p }) => ['pg8', 'arr7_3', 'cdf37_4'].includes(code) && p >= 0.02);
  it.each(short)('$id', async (point) => {
    const { fer, ber } = await deviations(point, point.decoder === 'SPA' ? 1200 : 3000, 'reference');
    expect(Math.abs(fer)).toBeLessThan(3.5);
    expect(Math.abs(ber)).toBeLessThan(3.5);
  });
});
