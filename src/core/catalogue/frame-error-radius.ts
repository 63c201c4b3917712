/** For each length n up to `maxLength`, the least radius w with P(more than w of n bits err) ≤ target: a decoder that
 *  corrects every pattern of w errors is good enough, whatever else it does.
 *  Walked upwards one bit at a time. With b = P(exactly w): one bit more adds p·b to the tail and turns b into
 *  b·(n + 1)(1 − p)/(n + 1 − w); a step of w takes the next term away. Each step is a few roundings, so that the tail is
 *  good to about 1e-9 of the target at n = 70,000; tests hold it against the tail itself. */
export function leastRadii(p: number, target: number, maxLength: number): Int32Array {
  const radii = new Int32Array(maxLength + 1);
  const odds = p / (1 - p);
  let w = 0;
  let exactly = 1;
  let beyond = 0;
  for (let n = 0; n < maxLength; n++) {
    beyond += p * exactly;
    exactly *= ((n + 1) * (1 - p)) / (n + 1 - w);
    while (beyond > target && w <= n) {
      w++;
      exactly *= ((n + 2 - w) / w) * odds;
      beyond -= exactly;
    }
    radii[n + 1] = w;
  }
  return radii;
}
