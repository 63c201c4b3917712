/** Cholesky's factorisation of a symmetric matrix of n rows, lower half read and overwritten; false when a pivot is not
 *  positive. When it runs to its end, the least eigenvalue of what was given is above −`roundingOf`: Rump, Verification
 *  of positive definiteness, BIT 46 (2006) 433–452, after Demmel 1989. */
export function factorises(matrix: Float64Array, n: number): boolean {
  for (let j = 0; j < n; j++) {
    const rowJ = j * n;
    let pivot = matrix[rowJ + j]!;
    for (let k = 0; k < j; k++) pivot -= matrix[rowJ + k]! ** 2;
    if (!(pivot > 0)) return false;
    const root = Math.sqrt(pivot);
    matrix[rowJ + j] = root;
    for (let i = j + 1; i < n; i++) {
      const rowI = i * n;
      let sum = matrix[rowI + j]!;
      for (let k = 0; k < j; k++) sum -= matrix[rowI + k]! * matrix[rowJ + k]!;
      matrix[rowI + j] = sum / root;
    }
  }
  return true;
}

/** Bound on what rounding in the factorisation, and in forming entries of size up to `largest`, may hide:
 *  γ/(1 − γ)·trace + n·u·largest with γ = (n + 2)u/(1 − (n + 2)u), doubled. */
export function roundingOf(n: number, trace: number, largest: number): number {
  const u = Number.EPSILON / 2;
  return 2 * ((n + 3) * u * trace + 4 * n * u * largest);
}
