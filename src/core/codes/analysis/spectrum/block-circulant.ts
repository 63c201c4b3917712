import type { QuasiCyclicForm } from '../../../gf2/quasi-cyclic.ts';
import { isBound, largestEigenvalueBound, slack } from './dense.ts';
import type { Overlaps } from './overlaps.ts';

/** Upper bound, proved, on the eigenvalues of M = HᵀH on the vectors of sum zero, for a matrix of circulants: Fourier's
 *  transform on each block of columns turns M into one Hermitian matrix of blocks × blocks a frequency. `most` is the
 *  eigenvalue of the all-one vector, taken away at frequency zero. */
export function blockCirculantEigenvalue(
  overlaps: Overlaps,
  { size, blocks }: Pick<QuasiCyclicForm, 'size' | 'blocks'>,
  most: number,
): number {
  const rows = Array.from({ length: blocks }, (_, a) => sparseRow(overlaps.row(a * size)));
  const turn = Float64Array.from({ length: size }, (_, i) => Math.cos((2 * Math.PI * i) / size));
  const quarter = Float64Array.from({ length: size }, (_, i) => Math.sin((2 * Math.PI * i) / size));
  // Each entry is a sum of whole numbers, `most` in total a row, times cosines within two roundings.
  const entryError = 2 * most * (4 + Math.max(...rows.map((row) => row.at.length))) * Number.EPSILON;
  let bound = 0;
  let theta = 0;
  for (let k = 0; k <= size / 2; k++) {
    const { matrix, n } = hermitianAt(k, rows, { size, blocks, turn, quarter });
    if (k === 0) for (let i = 0; i < n * n; i++) matrix[i]! -= most / n;
    if (n === 1) {
      bound = Math.max(bound, matrix[0]! + entryError);
      continue;
    }
    if (theta > 0 && isBound(matrix, n, theta)) bound = Math.max(bound, theta + slack(matrix, n, theta) + entryError);
    else {
      const next = largestEigenvalueBound(matrix, n, entryError);
      bound = Math.max(bound, next);
      theta = Math.max(theta, next);
    }
  }
  return bound;
}

function sparseRow(row: Float64Array): { at: number[]; value: number[] } {
  const at: number[] = [];
  const value: number[] = [];
  row.forEach((x, d) => {
    if (x === 0) return;
    at.push(d);
    value.push(x);
  });
  return { at, value };
}

/** The Hermitian matrix A + iB as the real symmetric (A, −B; B, A), whose eigenvalues are the same, twice each; A alone where
 *  B is zero, at frequencies 0 and size/2 and for one block. */
function hermitianAt(
  k: number,
  rows: readonly { at: number[]; value: number[] }[],
  { size, blocks, turn, quarter }: { size: number; blocks: number; turn: Float64Array; quarter: Float64Array },
): { matrix: Float64Array; n: number } {
  const real = blocks === 1 || k === 0 || 2 * k === size;
  const n = real ? blocks : 2 * blocks;
  const matrix = new Float64Array(n * n);
  rows.forEach(({ at, value }, a) => {
    for (let i = 0; i < at.length; i++) {
      const b = Math.floor(at[i]! / size);
      const angle = (k * (at[i]! % size)) % size;
      const re = value[i]! * turn[angle]!;
      matrix[a * n + b]! += re;
      if (real) continue;
      const im = value[i]! * quarter[angle]!;
      matrix[(a + blocks) * n + b + blocks]! += re;
      matrix[(a + blocks) * n + b]! += im;
      matrix[a * n + b + blocks]! -= im;
    }
  });
  return { matrix, n };
}
