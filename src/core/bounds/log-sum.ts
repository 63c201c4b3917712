/** ln Σ e^x over logarithms that may be −Infinity. */
export function logSum(logs: Iterable<number>): number {
  let top = Number.NEGATIVE_INFINITY;
  let sum = 0;
  for (const x of logs) {
    if (x === Number.NEGATIVE_INFINITY) continue;
    if (x <= top) sum += Math.exp(x - top);
    else {
      sum = sum * Math.exp(top - x) + 1;
      top = x;
    }
  }
  return sum === 0 ? Number.NEGATIVE_INFINITY : top + Math.log(sum);
}
