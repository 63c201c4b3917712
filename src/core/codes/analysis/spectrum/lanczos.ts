import type { SeededRandom } from '../../../algebra/seeded-random.ts';

/** An estimate, from below, of the largest eigenvalue of a symmetric operator by Lanczos' iteration without
 *  reorthogonalisation: copies of found eigenvalues do no harm to the largest. Proves nothing by itself. */
export function lanczosLargest(
  n: number,
  times: (x: Float64Array) => Float64Array,
  random: SeededRandom,
  steps = 60,
): number {
  let v = normalised(Float64Array.from({ length: n }, () => random.next32() / 2 ** 31 - 1));
  let before: Float64Array = new Float64Array(n);
  const diagonal: number[] = [];
  const beside: number[] = [];
  let beta = 0;
  for (let step = 0; step < Math.min(steps, n); step++) {
    const w = times(v);
    const alpha = dot(w, v);
    diagonal.push(alpha);
    for (let i = 0; i < n; i++) w[i]! -= alpha * v[i]! + beta * before[i]!;
    beta = Math.sqrt(dot(w, w));
    if (beta < 1e-10 * Math.max(1, Math.abs(alpha))) break;
    beside.push(beta);
    before = v;
    v = w.map((x) => x / beta);
  }
  return largestOfTridiagonal(diagonal, beside);
}

/** Bisection on the number of eigenvalues above x, by the signs of the pivots (Sturm's sequence). */
function largestOfTridiagonal(diagonal: readonly number[], beside: readonly number[]): number {
  const radius = diagonal.map((a, i) => Math.abs(a) + (beside[i - 1] ?? 0) + (beside[i] ?? 0));
  let high = Math.max(...radius);
  let low = -high;
  for (let i = 0; i < 80 && high - low > 1e-14 * Math.max(1, Math.abs(high)); i++) {
    const x = (low + high) / 2;
    if (anyAbove(diagonal, beside, x)) low = x;
    else high = x;
  }
  return high;
}

function anyAbove(diagonal: readonly number[], beside: readonly number[], x: number): boolean {
  let pivot = 1;
  for (let i = 0; i < diagonal.length; i++) {
    const b = i > 0 ? beside[i - 1]! : 0;
    pivot = diagonal[i]! - x - (b * b) / pivot;
    if (pivot > 0) return true;
    if (pivot === 0) pivot = -Number.MIN_VALUE;
  }
  return false;
}

const dot = (a: Float64Array, b: Float64Array) => {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
};

function normalised(x: Float64Array): Float64Array {
  const length = Math.sqrt(dot(x, x));
  return x.map((value) => value / length);
}
