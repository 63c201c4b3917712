import { seededRandom } from '../../../algebra/seeded-random.ts';
import { lanczosLargest } from './lanczos.ts';
import { factorises, roundingOf } from './positive-definite.ts';

/** An upper bound, proved, on the largest eigenvalue of a symmetric matrix whose entries are off by `entryError` at most in
 *  norm: Lanczos' estimate raised a little, and a bit more as long as θI − A does not factorise. At most as far above the
 *  eigenvalue as the raise and the rounding, some 10^-9 of it. */
export function largestEigenvalueBound(matrix: Float64Array, n: number, entryError = 0): number {
  const times = (x: Float64Array) => {
    const y = new Float64Array(n);
    for (let r = 0; r < n; r++) {
      let sum = 0;
      for (let c = 0; c < n; c++) sum += matrix[r * n + c]! * x[c]!;
      y[r] = sum;
    }
    return y;
  };
  const estimate = lanczosLargest(n, times, seededRandom('eigenvalue'));
  let raise = 1e-9 * Math.max(1, Math.abs(estimate));
  for (;;) {
    const theta = estimate + raise;
    if (isBound(matrix, n, theta)) return theta + slack(matrix, n, theta) + entryError;
    raise *= 4;
  }
}

/** Whether θI − A factorises, so that no eigenvalue of A passes θ by more than the rounding. */
export function isBound(matrix: Float64Array, n: number, theta: number): boolean {
  const shifted = matrix.map((value) => -value);
  for (let i = 0; i < n; i++) shifted[i * n + i]! += theta;
  return factorises(shifted, n);
}

export function slack(matrix: Float64Array, n: number, theta: number): number {
  let trace = 0;
  let largest = Math.abs(theta);
  for (let i = 0; i < n; i++) {
    const d = matrix[i * n + i]!;
    trace += Math.abs(theta - d);
    largest = Math.max(largest, Math.abs(d));
  }
  return roundingOf(n, trace, largest);
}
