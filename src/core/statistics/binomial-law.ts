/** Natural logarithms of 0!, 1!, …, n!, by a compensated sum of logarithms, right to a few units in the last place. */
export function logFactorials(n: number): Float64Array {
  const table = new Float64Array(n + 1);
  let sum = 0;
  let lost = 0;
  for (let i = 1; i <= n; i++) {
    const term = Math.log(i) - lost;
    const next = sum + term;
    lost = next - sum - term;
    sum = next;
    table[i] = sum;
  }
  return table;
}

/** P(W = w) of Binomial(n, p) for w = 0 … n, by logarithms; terms below 10^-308 come out as 0.
 *  @param logs `logFactorials(n)`, when many laws of one n are wanted. */
export function binomialLaw(n: number, p: number, logs: Float64Array = logFactorials(n)): Float64Array {
  const logP = Math.log(p);
  const logQ = Math.log1p(-p);
  return Float64Array.from({ length: n + 1 }, (_, w) =>
    Math.exp(logs[n]! - logs[w]! - logs[n - w]! + (w === 0 ? 0 : w * logP) + (w === n ? 0 : (n - w) * logQ)),
  );
}
