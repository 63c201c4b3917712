/** Q(x) = P(Z > x) for a standard normal Z, to about 1e-14 relative at any depth that a double can hold. */
export function normalTail(x: number): number {
  if (x < 0) return 1 - normalTail(-x);
  return x < 2.5 ? 0.5 - centralArea(x) : upperTail(x);
}

/** x with Q(x) = tail, 0 < tail < 1, by bisection on the tail's logarithm and Newton's steps. */
export function normalQuantile(tail: number): number {
  if (tail > 0.5) return -normalQuantile(1 - tail);
  let low = 0;
  let high = 40;
  for (let i = 0; i < 20; i++) {
    const middle = (low + high) / 2;
    if (normalTail(middle) > tail) low = middle;
    else high = middle;
  }
  let x = (low + high) / 2;
  for (let i = 0; i < 4; i++) {
    const here = normalTail(x);
    x += (here / density(x)) * Math.log(here / tail);
  }
  return x;
}

const density = (x: number) => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);

/** P(0 < Z < x) by the series φ(x)·(x + x³/3 + x⁵/15 + …), all of one sign (Abramowitz and Stegun 26.2.11). */
function centralArea(x: number): number {
  let term = x;
  let sum = x;
  for (let n = 3; term > sum * 1e-17; n += 2) {
    term *= (x * x) / n;
    sum += term;
  }
  return sum * density(x);
}

/** Laplace's continued fraction φ(x)/(x + 1/(x + 2/(x + 3/…))) (Abramowitz and Stegun 26.2.14), from the far end. */
function upperTail(x: number): number {
  let fraction = x;
  for (let n = Math.ceil(30 + 600 / (x * x)); n > 0; n--) fraction = x + n / fraction;
  return density(x) / fraction;
}
