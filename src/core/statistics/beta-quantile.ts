import { type LogTail, lowerTail, upperTail } from './incomplete-beta.ts';

/** The x that Beta(a, b) falls below with probability `tail`, 0 < tail ≤ 1/2, for a, b ≥ 1/2. Relative error a few units
 *  in the fifteenth place, whatever the tail and up to a + b = 10^15. */
export function lowerQuantile(tail: number, a: number, b: number): number {
  return solved(tail, a, b, lowerTail);
}

/** The x that Beta(a, b) exceeds with probability `tail`, 0 < tail ≤ 1/2: no 1 − tail is rounded on the way. */
export function upperQuantile(tail: number, a: number, b: number): number {
  // Close to 1 it is the distance to 1 that can be told exactly.
  return a > b ? 1 - solved(tail, b, a, lowerTail) : solved(tail, a, b, upperTail);
}

/** Newton's method for ln tail as a function of ln x, from the mean. That function is concave (Beta's density by ln x is
 *  log-concave for b ≥ 1), so that after one step the root is approached from one side and never passed. */
function solved(tail: number, a: number, b: number, at: (a: number, b: number, x: number) => LogTail): number {
  const target = Math.log(tail);
  let logX = Math.log(a / (a + b));
  for (let step = 0; step < 200; step++) {
    const { log, slope } = at(a, b, Math.exp(logX));
    const change = (target - log) / slope;
    // The step may aim past x = 1.
    const next = logX + change < 0 ? logX + change : logX / 2;
    // Errors are squared by each step, so that the next one would add nothing.
    if (Math.abs(change) < 1e-9 * Math.min(1, -logX)) return Math.exp(next);
    logX = next;
  }
  return Math.exp(logX);
}
