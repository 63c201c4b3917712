import { type Random, uniform53 } from '../simulation/random.ts';
import { portableLog } from './portable-functions.ts';

/** Standard Gaussian numbers by the polar method (Marsaglia and Bray, SIAM Review 6, 1964), in pairs, from operations
 *  that every engine rounds alike. A draw is never larger than about 12, where the tail is below 10^-32. */
export function createGaussian(random: Random): () => number {
  let spare: number | null = null;
  return () => {
    if (spare !== null) {
      const value = spare;
      spare = null;
      return value;
    }
    for (;;) {
      const a = 2 * uniform53(random) - 1;
      const b = 2 * uniform53(random) - 1;
      const square = a * a + b * b;
      if (square >= 1 || square === 0) continue;
      const factor = Math.sqrt((-2 * portableLog(square)) / square);
      spare = b * factor;
      return a * factor;
    }
  };
}
