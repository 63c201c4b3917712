import { rowOf, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Eigenvalues of HᵀH, descending, by Jacobi's rotations (1846). */
export function plainEigenvalues(H: SparseMatrix): number[] {
  const n = H.cols;
  const A = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  for (let r = 0; r < H.rows; r++) for (const c of rowOf(H, r)) for (const d of rowOf(H, r)) A[c]![d]!++;
  for (let sweep = 0; sweep < 60; sweep++) {
    let off = 0;
    for (let p = 0; p < n; p++) {
      for (let q = p + 1; q < n; q++) {
        off += A[p]![q]! ** 2;
        if (Math.abs(A[p]![q]!) < 1e-15) continue;
        const theta = (A[q]![q]! - A[p]![p]!) / (2 * A[p]![q]!);
        const t = Math.sign(theta || 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
        const c = 1 / Math.sqrt(t * t + 1);
        rotate(A, { p, q, c, s: t * c });
      }
    }
    if (off < 1e-22) break;
  }
  return A.map((row, i) => row[i]!).sort((a, b) => b - a);
}

function rotate(A: number[][], { p, q, c, s }: { p: number; q: number; c: number; s: number }): void {
  for (let i = 0; i < A.length; i++) {
    const [x, y] = [A[i]![p]!, A[i]![q]!];
    A[i]![p] = c * x - s * y;
    A[i]![q] = s * x + c * y;
  }
  for (let i = 0; i < A.length; i++) {
    const [x, y] = [A[p]![i]!, A[q]![i]!];
    A[p]![i] = c * x - s * y;
    A[q]![i] = s * x + c * y;
  }
}
