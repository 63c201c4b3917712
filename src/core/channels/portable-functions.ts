/** Exponential, logarithm and Gaussian tail from +, −, ×, ÷ and √ alone. Those five are rounded alike by every engine
 *  (IEEE 754), while the language leaves the last bits of Math.exp and Math.log open; a shard that used them could come
 *  out differently in another browser. Errors are a few units in the last place, of no account for a noise law. */

const ln2High = 0.6931471803691238; // 32 bits of ln 2, so that k·ln2High is exact
const ln2Low = 1.9082149292705877e-10;
const ln10 = Math.LN10;

/** 2^k by squaring; exact, or 0, or infinite. */
function powerOfTwo(k: number): number {
  let result = 1;
  let factor = k < 0 ? 0.5 : 2;
  for (let rest = Math.abs(k); rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) result *= factor;
    factor *= factor;
  }
  return result;
}

export function portableExp(x: number): number {
  if (x < -745) return 0;
  const k = Math.round(x / (ln2High + ln2Low));
  const r = (x - k * ln2High - k * ln2Low) / 4;
  let sum = 1;
  for (let i = 14; i > 0; i--) sum = 1 + (sum * r) / i;
  const fourth = sum * sum * (sum * sum);
  // In two halves, so that a result in the subnormal range is rounded once.
  const half = Math.trunc(k / 2);
  return fourth * powerOfTwo(half) * powerOfTwo(k - half);
}

/** Natural logarithm of x > 0, by x = 2^k·m and log m = 2·atanh((m − 1)/(m + 1)). */
export function portableLog(x: number): number {
  let m = x;
  let k = 0;
  for (; m > Math.SQRT2; k++) m /= 2;
  for (; m < Math.SQRT1_2; k--) m *= 2;
  const s = (m - 1) / (m + 1);
  const square = s * s;
  let sum = 0;
  for (let i = 25; i > 0; i -= 2) sum = 1 / i + square * sum;
  return k * ln2High + (k * ln2Low + 2 * s * sum);
}

/** 10^(x/10): a level in decibel as a ratio. */
export function fromDecibel(x: number): number {
  return portableExp((x * ln10) / 10);
}

/** Q(x) = P(standard Gaussian > x) for x ≥ 0: below 3 the series of Φ (Abramowitz and Stegun 26.2.11), above it the
 *  continued fraction of Laplace (26.2.14) to depth 80. */
export function gaussianTail(x: number): number {
  const density = portableExp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
  if (x < 3) {
    let term = x;
    let sum = x;
    for (let i = 3; term > sum * 1e-17; i += 2) {
      term *= (x * x) / i;
      sum += term;
    }
    return 0.5 - density * sum;
  }
  let tail = x;
  for (let i = 80; i > 0; i--) tail = x + i / tail;
  return density / tail;
}
