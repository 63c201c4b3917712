import { describe, expect, it } from 'vitest';
import { ParamError } from '../../../src/core/errors.ts';
import { randomFrom, uniform53 } from '../../../src/core/simulation/random.ts';
import { berInterval } from '../../../src/core/statistics/ber-interval.ts';

/** Frames fail with probability `fer`; a failed frame has 4, 8 or 12 wrong bits, each a third of the time. */
function sums(fer: number, frames: number, random: ReturnType<typeof randomFrom>) {
  const counted = { frames, frameErrors: 0, bitErrors: 0, bitErrorsSquared: 0 };
  for (let f = 0; f < frames; f++) {
    if (uniform53(random) >= fer) continue;
    const bits = 4 * (1 + Math.floor(3 * uniform53(random)));
    counted.frameErrors += 1;
    counted.bitErrors += bits;
    counted.bitErrorsSquared += bits ** 2;
  }
  return counted;
}

describe('the interval of the bit error rate', () => {
  it.each([
    ['few', 0.02, 500],
    ['many', 0.1, 3000],
  ])('covers the truth with %s failed frames about as often as it says', (_, fer, frames) => {
    const random = randomFrom([1, 2, 3, frames]);
    const truth = (fer * 8) / 100;
    let covered = 0;
    for (let trial = 0; trial < 400; trial++) {
      const { lower, upper } = berInterval(sums(fer, frames, random), 100, 0.95);
      if (lower <= truth && truth <= upper) covered += 1;
    }
    expect(covered).toBeGreaterThan(400 * 0.93 - 3 * Math.sqrt(400 * 0.05 * 0.95));
  });

  it('with no failure runs from 0 to the limit on the frame error rate', () => {
    const none = { frames: 1000, frameErrors: 0, bitErrors: 0, bitErrorsSquared: 0 };
    const { lower, upper } = berInterval(none, 21, 0.95);
    expect(lower).toBe(0);
    expect(upper).toBeGreaterThan(0.003);
    expect(upper).toBeLessThan(0.005);
  });

  it('is refused without frames', () => {
    const none = { frames: 0, frameErrors: 0, bitErrors: 0, bitErrorsSquared: 0 };
    expect(() => berInterval(none, 21, 0.95)).toThrow(ParamError);
  });
});
