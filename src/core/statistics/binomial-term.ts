const halfLogTwoPi = 0.5 * Math.log(2 * Math.PI);

/** ln P(W = w) for W binomial(n, p), 0 < p < 1, by the saddle-point form of C. Loader (2000), "Fast and accurate
 *  computation of binomial probabilities": no large factorials cancel, so the absolute error stays near 1e-14 of the
 *  logarithm even at n = 10^6. */
export function logBinomialTerm(n: number, w: number, p: number): number {
  if (w < 0 || w > n) return Number.NEGATIVE_INFINITY;
  if (w === 0) return n * Math.log1p(-p);
  if (w === n) return n * Math.log(p);
  const correction = stirlingError(n) - stirlingError(w) - stirlingError(n - w);
  const deviance = devianceOf(w, n * p) + devianceOf(n - w, n * (1 - p));
  return correction - deviance - halfLogTwoPi + 0.5 * (Math.log(n) - Math.log(w) - Math.log(n - w));
}

/** ln n! − ln(√(2πn)(n/e)^n): exact sums up to 15, Stirling's series beyond. */
function stirlingError(n: number): number {
  if (n <= 15) {
    let logFactorial = 0;
    for (let i = 2; i <= n; i++) logFactorial += Math.log(i);
    return logFactorial - (n + 0.5) * Math.log(n) + n - halfLogTwoPi;
  }
  const square = n * n;
  return (1 / 12 - (1 / 360 - (1 / 1260 - (1 / 1680 - 1 / 1188 / square) / square) / square) / square) / n;
}

/** x·ln(x/m) + m − x, without cancellation when x is near m. */
function devianceOf(x: number, m: number): number {
  if (Math.abs(x - m) >= 0.1 * (x + m)) return x * Math.log(x / m) + m - x;
  const ratio = (x - m) / (x + m);
  let sum = (x - m) * ratio;
  let power = 2 * x * ratio;
  for (let j = 3; ; j += 2) {
    power *= ratio * ratio;
    const next = sum + power / j;
    if (next === sum) return next;
    sum = next;
  }
}
