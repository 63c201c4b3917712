import { deviance, halfLogTwoPi, stirlingError } from './saddle-point.ts';

/** A tail of Beta(a, b) at a point: its logarithm, and the derivative of that by the point's own logarithm. */
export interface LogTail {
  log: number;
  slope: number;
}

/** ln P(X ≤ x) for X of Beta(a, b), 0 < x < 1, right to a few units in the fifteenth place where x is left of the
 *  mean, which is where it is meant for; right of it the sum is that of the other tail's small complement. */
export function lowerTail(a: number, b: number, x: number): LogTail {
  const y = 1 - x;
  const toMean = a - (a + b) * x;
  const sum = fraction(a, b, x, y, toMean);
  return { log: logFront(a, b, x, toMean) + Math.log(sum), slope: 1 / (y * sum) };
}

/** ln P(X ≥ x), for x right of the mean. */
export function upperTail(a: number, b: number, x: number): LogTail {
  const y = 1 - x;
  const toMean = a - (a + b) * x;
  const sum = fraction(b, a, y, x, -toMean);
  return { log: logFront(a, b, x, toMean) + Math.log(sum), slope: -1 / (y * sum) };
}

/** ln(x^a (1 − x)^b / B(a, b)) by Loader's saddle-point form.
 *  @param toMean a − (a + b)·x, which is also (a + b)·(1 − x) − b: small beside a and b, where x is near the mean. */
function logFront(a: number, b: number, x: number, toMean: number): number {
  const correction = stirlingError(a + b) - stirlingError(a) - stirlingError(b);
  const deviances = deviance(a, (a + b) * x, toMean) + deviance(b, (a + b) * (1 - x), -toMean);
  return correction - deviances - halfLogTwoPi + 0.5 * (Math.log(a) + Math.log(b) - Math.log(a + b));
}

/** The continued fraction of A. DiDonato and A. Morris (1992, ACM TOMS 18, algorithm 708, routine BFRAC), which times
 *  x^a y^b / B(a, b) is P(X ≤ x). About √min(a, b) steps near the mean, fewer away from it. */
function fraction(a: number, b: number, x: number, y: number, toMean: number): number {
  const c = 1 + toMean;
  const c1 = 1 + 1 / a;
  let p = 1;
  let s = a + 1;
  let [A, B, nextA, nextB] = [0, 1, 1, c / c1];
  let value = nextA / nextB;
  for (let n = 1; ; n++) {
    const w = n * (b - n) * x;
    const e = a / s;
    const alpha = p * (p + b / a) * e * e * w * x;
    const beta = n + w / s + ((1 + n / a) / (c1 + (2 * n) / a)) * (c + n * (1 + y));
    p = 1 + n / a;
    s += 2;
    [A, nextA] = [nextA, alpha * A + beta * nextA];
    [B, nextB] = [nextB, alpha * B + beta * nextB];
    const before = value;
    value = nextA / nextB;
    if (Math.abs(value - before) <= 1e-15 * value) return value;
    // Scaled so that B is 1, or the terms would overflow.
    [A, B, nextA, nextB] = [A / nextB, B / nextB, value, 1];
  }
}
