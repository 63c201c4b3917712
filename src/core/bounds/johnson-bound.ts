import { ParamError } from '../errors.ts';

/** Upper bound on the number of words of length n, weight w and minimum distance d, by Johnson's two recursions (Johnson
 *  1962; MacWilliams and Sloane 1977, ch. 17, Theorem 4). For d = 2(w − t + 1) it is met exactly by Steiner systems
 *  S(t, w, n) of the usual range. An odd d counts as d + 1, since distances of such words are even.
 *  @throws ParamError unless 0 ≤ w ≤ n and d ≥ 1 are whole. */
export function johnsonBound(n: number, d: number, w: number): number {
  requireWhole(n, d, w);
  return byLength(n, evenDistance(d), w, (_length, _weight, recursive) => recursive);
}

/** Johnson's first recursion alone, ⌊n/w ⌊(n−1)/(w−1) ⌊…⌋⌋⌋: the bound that counts a packing's density. */
export function johnsonPackingBound(n: number, d: number, w: number): number {
  requireWhole(n, d, w);
  const even = evenDistance(d);
  if (2 * w < even) return 1;
  if (2 * w === even) return Math.floor(n / w);
  return Math.floor((n * johnsonPackingBound(n - 1, even, w - 1)) / w);
}

/** The recursions strengthened at each step by the count of pairs of words that meet in a point: for M words with
 *  Mw = nq + r, nq(q − 1) + 2qr ≤ (w − d/2)·M(M − 1) (Johnson 1962). Never above johnsonBound. */
export function refinedJohnsonBound(n: number, d: number, w: number): number {
  requireWhole(n, d, w);
  const even = evenDistance(d);
  return byLength(n, even, w, (length, weight, recursive) => byPairs(length, even, weight, recursive));
}

/** Both recursions from the shortest length up, each value sharpened by `refine`: a length looks only at the one before,
 *  so codes of any length take no depth of calls and two rows of memory. Past 2^53 values are rounded. */
function byLength(
  n: number,
  d: number,
  w: number,
  refine: (length: number, weight: number, recursive: number) => number,
): number {
  const half = d / 2;
  if (w < half || n - w < half) return 1;
  let shorter = new Float64Array(w + 1).fill(1);
  let bounds = new Float64Array(w + 1).fill(1);
  for (let length = 1; length <= n; length++) {
    for (let weight = half; weight <= Math.min(w, length); weight++) {
      if (2 * weight > length) bounds[weight] = bounds[length - weight]!;
      else if (weight === half) bounds[weight] = Math.floor(length / weight);
      else {
        const byPoint = Math.floor((length * shorter[weight - 1]!) / weight);
        const byHole = Math.floor((length * shorter[weight]!) / (length - weight));
        bounds[weight] = refine(length, weight, Math.min(byPoint, byHole));
      }
    }
    [shorter, bounds] = [bounds, shorter];
  }
  return shorter[w]!;
}

/** Largest M up to `most` for which the count of pairs allows every number of words up to M. */
function byPairs(n: number, d: number, w: number, most: number): number {
  // The inequality can first fail only while M is below this, where its quadratic terms cross.
  const excess = w * w - n * (w - d / 2);
  if (excess <= 0) return most;
  const last = Math.min(most, Math.ceil((n * n) / excess) + n + 1);
  for (let M = 1; M <= last; M++) {
    const q = Math.floor((M * w) / n);
    const r = M * w - n * q;
    if (n * q * (q - 1) + 2 * q * r > (w - d / 2) * M * (M - 1)) return M - 1;
  }
  return most;
}

const evenDistance = (d: number) => d + (d % 2);

function requireWhole(n: number, d: number, w: number): void {
  if (!Number.isSafeInteger(n) || n < 1) throw new ParamError('n', n, 'a whole number of 1 or more');
  if (!Number.isSafeInteger(w) || w < 0 || w > n) throw new ParamError('w', w, `a whole number from 0 to n = ${n}`);
  if (!Number.isSafeInteger(d) || d < 1) throw new ParamError('d', d, 'a whole number of 1 or more');
}
