/** For a recursion of one number x whose step rises with the channel's parameter: the least parameter at which it gets
 *  stuck. `stuckAt(x)` is the least parameter for which the recursion does not get below x. Found on a grid even in ln x,
 *  then refined by golden sections. */
export function fixedPointThreshold(stuckAt: (x: number) => number, top: number): number {
  const at = (logX: number) => Math.min(top, Math.max(0, stuckAt(Math.exp(logX))));
  const steps = 4000;
  const low = Math.log(1e-7);
  const width = -low / steps;
  let best = 0;
  for (let i = 1; i <= steps; i++) if (at(low + i * width) < at(low + best * width)) best = i;
  return goldenMinimum(at, low + (best - 1) * width, low + (best + 1) * width);
}

function goldenMinimum(f: (x: number) => number, from: number, to: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [from, Math.min(0, to)];
  for (let i = 0; i < 80; i++) {
    const left = b - ratio * (b - a);
    const right = a + ratio * (b - a);
    if (f(left) < f(right)) b = right;
    else a = left;
  }
  return f((a + b) / 2);
}
