import type { DegreeFractions } from './edge-degrees.ts';
import { fourierTransform } from './fourier.ts';

/** A distribution of log-likelihood ratios on the grid −half … half times a step; mass beyond the ends sits on them. The
 *  all-zero word is sent, so negative values are errors. */
export interface Density {
  half: number;
  mass: Float64Array;
}

export const emptyDensity = (half: number): Density => ({ half, mass: new Float64Array(2 * half + 1) });

/** Probability of deciding wrongly, zero counted half. */
export function errorProbability({ half, mass }: Density): number {
  let sum = mass[half]! / 2;
  for (let i = 0; i < half; i++) sum += mass[i]!;
  return sum;
}

/** Density of channel + the sum of degree − 1 independent messages, averaged over the degrees: a product of transforms,
 *  cut back to the grid only at the end. */
export function throughBits(channel: Density, message: Density, columns: DegreeFractions): Density {
  const { half } = message;
  const most = columns.reduce((max, [degree]) => Math.max(max, degree), 0);
  const size = 2 ** Math.ceil(Math.log2(2 * half * most + 1));
  const a = transformed(message, size);
  const b = transformed(channel, size);
  for (let i = 0; i < size; i++) {
    const [re, im] = weightedPowers(a.re[i]!, a.im[i]!, columns);
    const [x, y] = [b.re[i]!, b.im[i]!];
    b.re[i] = x * re - y * im;
    b.im[i] = x * im + y * re;
  }
  fourierTransform(b.re, b.im, true);
  const out = emptyDensity(half);
  for (let i = 0; i < size; i++) {
    const value = i <= size / 2 ? i : i - size;
    const at = Math.max(-half, Math.min(half, value)) + half;
    out.mass[at]! += Math.max(0, b.re[i]! / size);
  }
  return normalised(out);
}

/** Rounding errors of the total would grow by (dv − 1)(dc − 1) an iteration. */
function normalised(density: Density): Density {
  const total = density.mass.reduce((sum, x) => sum + x, 0);
  for (let i = 0; i < density.mass.length; i++) density.mass[i]! /= total;
  return density;
}

function transformed({ half, mass }: Density, size: number): { re: Float64Array; im: Float64Array } {
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  for (let i = 0; i < mass.length; i++) re[(i - half + size) % size] = mass[i]!;
  fourierTransform(re, im);
  return { re, im };
}

/** Σ fraction·z^(degree − 1). */
function weightedPowers(re: number, im: number, columns: DegreeFractions): [number, number] {
  let sumRe = 0;
  let sumIm = 0;
  for (const [degree, fraction] of columns) {
    let [x, y] = [1, 0];
    for (let i = 1; i < degree; i++) [x, y] = [x * re - y * im, x * im + y * re];
    sumRe += fraction * x;
    sumIm += fraction * y;
  }
  return [sumRe, sumIm];
}
