/** The two small terms of C. Loader (2000), "Fast and accurate computation of binomial probabilities": with them a
 *  binomial or beta density is a product in which no large factorials cancel. */

export const halfLogTwoPi = 0.5 * Math.log(2 * Math.PI);

/** ln Γ(z + 1) − ln(√(2πz)(z/e)^z) for z > 0, whole or not: Stirling's series from 16 on, its recurrence below. */
export function stirlingError(z: number): number {
  let below = 0;
  let x = z;
  for (; x < 16; x++) below += (x + 0.5) * Math.log1p(1 / x) - 1;
  const square = x * x;
  const series = 1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square;
  return below + series / x;
}

/** x·ln(x/m) + m − x, without cancellation when x is near m.
 *  @param difference x − m, for callers who know it better than the two tell. */
export function deviance(x: number, m: number, difference = x - m): number {
  if (Math.abs(difference) >= 0.1 * (x + m)) return x * Math.log(x / m) - difference;
  const ratio = difference / (x + m);
  let sum = difference * ratio;
  let power = 2 * x * ratio;
  for (let j = 3; ; j += 2) {
    power *= ratio * ratio;
    const next = sum + power / j;
    if (next === sum) return next;
    sum = next;
  }
}
