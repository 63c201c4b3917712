import type { Enclosure } from '../evidence.ts';

/** Interval for the mean of a variable within 0 … 1 from m ≥ 1 independent values, given by their sum and sum of
 *  squares: the empirical Bernstein bound of Maurer and Pontil (COLT 2009, Theorem 4), each side missed with
 *  probability at most `tail`, whatever the law. */
export function boundedMeanInterval(m: number, sum: number, squares: number, tail: number): Enclosure {
  if (m < 2) return { lower: 0, upper: 1 };
  const mean = sum / m;
  const variance = Math.max(0, (squares - mean * sum) / (m - 1));
  const log = Math.log(2 / tail);
  const reach = Math.sqrt((2 * variance * log) / m) + (7 * log) / (3 * (m - 1));
  return { lower: Math.max(0, mean - reach), upper: Math.min(1, mean + reach) };
}
