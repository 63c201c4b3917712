import type { Graded } from '../../../evidence.ts';
import { quasiCyclicForm } from '../../../gf2/quasi-cyclic.ts';
import { type SparseMatrix, transpose } from '../../sparse-matrix.ts';
import type { TannerOrbits } from '../tanner-orbits.ts';
import { columnWeightProfile, rowWeightProfile } from '../weights.ts';
import { blockCirculantEigenvalue } from './block-circulant.ts';
import { largestEigenvalueBound } from './dense.ts';
import { overlapsOf } from './overlaps.ts';
import { quadraticEigenvalue } from './quadratic.ts';

/** What the eigenvalues of HᵀH say of a matrix with one column weight and one row weight. */
export interface OverlapSpectrum {
  columnWeight: number;
  rowWeight: number;
  /** Column weight times row weight: the eigenvalue of the all-one vector. */
  largest: number;
  /** An upper bound on all eigenvalues on vectors of sum zero; exact where the method says so. */
  second: Graded<number>;
}

/** Operations that the methods may take. */
export interface SpectrumBudget {
  operations: number;
}

/** The two largest eigenvalues of HᵀH, the second from above and proved: in whole numbers for designs and geometries, by
 *  Fourier's transform for matrices of circulants, by Cholesky's factorisation otherwise. Null for matrices that are not
 *  regular, or when the budget allows none of them. */
export function overlapSpectrum(
  H: SparseMatrix,
  orbits: TannerOrbits,
  { operations }: SpectrumBudget,
): OverlapSpectrum | null {
  const [columns, rows] = [columnWeightProfile(H), rowWeightProfile(H)];
  if (columns.length !== 1 || rows.length !== 1 || H.cols < 2) return null;
  const [columnWeight, rowWeight] = [columns[0]![0], rows[0]![0]];
  const largest = columnWeight * rowWeight;
  const regular = { columnWeight, rowWeight, largest };
  const overlaps = overlapsOf(H);
  const representatives = orbits.columns.representatives.length;
  if (representatives * (2 * H.colIndex.length + H.cols) <= operations) {
    const exact = quadraticEigenvalue(overlaps, orbits.columns);
    if (exact) {
      const { value, relation } = exact;
      const method = `${relation}, M = HᵀH, checked in whole numbers`;
      return { ...regular, second: { value, grade: 'computed', method } };
    }
  }
  const form = quasiCyclicForm(H);
  if (form && transformWork(form, largest) <= operations) {
    const value = blockCirculantEigenvalue(overlaps, form, largest);
    const method = `Fourier transform of circulants of size ${form.size}, rounding enclosed`;
    return { ...regular, second: { value, grade: 'computed', method } };
  }
  const side = H.rows < H.cols ? transpose(H) : H;
  if (side.cols ** 3 / 3 > operations) return null;
  return { ...regular, second: { value: denseEigenvalue(side, largest), grade: 'computed', method: denseMethod } };
}

const denseMethod = 'Lanczos iteration, proved from above by a Cholesky factorisation (Rump 2006)';

function transformWork({ size, blocks }: { size: number; blocks: number }, largest: number): number {
  return (size / 2) * (blocks * Math.min(largest, size * blocks) + (2 * blocks) ** 3 / 3);
}

/** HᵀH and HHᵀ share their eigenvalues other than zero, so the smaller will do; the all-one vector is taken away. */
function denseEigenvalue(H: SparseMatrix, largest: number): number {
  const n = H.cols;
  const { row } = overlapsOf(H);
  const matrix = new Float64Array(n * n);
  for (let c = 0; c < n; c++) matrix.set(row(c), c * n);
  for (let i = 0; i < n * n; i++) matrix[i]! -= largest / n;
  return Math.max(0, largestEigenvalueBound(matrix, n));
}
