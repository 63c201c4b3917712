import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { downsample, type Placed } from '@/core/statistics/downsample.ts';

const arbitraryMarks = fc
  .array(
    fc.record({ x: fc.integer({ min: 0, max: 60 }), y: fc.integer({ min: 0, max: 1000 }), isBound: fc.boolean() }),
    {
      maxLength: 200,
    },
  )
  .map((marks) => marks.sort((a, b) => a.x - b.x));

describe('thinned marks', () => {
  it('keep the highest and lowest measured mark and bound of every bucket, in order', () => {
    fc.assert(
      fc.property(arbitraryMarks, (marks) => {
        const kept = downsample(marks, 10, 0);
        expect(kept).toEqual(marks.filter((mark) => kept.includes(mark)));
        for (let bucket = 0; bucket <= 6; bucket++)
          for (const isBound of [false, true]) {
            const inBucket = (m: Placed) => Math.floor(m.x / 10) === bucket && m.isBound === isBound;
            const all = marks.filter(inBucket).map((m) => m.y);
            const left = kept.filter(inBucket).map((m) => m.y);
            if (all.length === 0) continue;
            expect(Math.max(...left)).toBe(Math.max(...all));
            expect(Math.min(...left)).toBe(Math.min(...all));
            expect(left.length).toBeLessThanOrEqual(4);
          }
      }),
    );
  });

  it('are at most six a bucket for a hundred thousand points', () => {
    const marks = Array.from({ length: 100_000 }, (_, i) => ({
      x: i / 125,
      y: 300 + 200 * Math.sin(i * 1.7),
      isBound: i % 50 === 0,
    }));
    const kept = downsample(marks, 8);
    expect(kept.length).toBeLessThanOrEqual(6 * 101);
    expect(kept.some((mark) => mark.isBound)).toBe(true);
  });

  it('are all kept when there are few', () => {
    const marks = [{ x: 1, y: 2, isBound: false }];
    expect(downsample(marks, 8)).toBe(marks);
  });
});
