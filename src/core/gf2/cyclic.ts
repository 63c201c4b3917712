import {
  degreeOf,
  type Gf2Polynomial,
  gcdPolynomials,
  polynomialOf,
  xToTheNMinusOne,
} from '../algebra/gf2-polynomial.ts';
import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';
import { rowIndex } from './row-index.ts';

/** First row of a circulant, as ascending columns, when row i is row 0 moved i places right (`step` 1) or left (−1). */
export interface Circulant {
  n: number;
  offsets: Uint32Array;
  step: 1 | -1;
}

/** Whether H is square and each row is the former moved by one place; null when it is not. */
export function circulantOf(H: SparseMatrix): Circulant | null {
  const n = H.cols;
  if (H.rows !== n || n === 0 || H.colIndex.length % n !== 0) return null;
  const weight = H.colIndex.length / n;
  for (let i = 0; i <= n; i++) if (H.rowStart[i] !== i * weight) return null;
  for (const step of [1, -1] as const) {
    if (everyRowMoves(H, weight, step)) return { n, offsets: rowOf(H, 0).slice(), step };
  }
  return null;
}

function everyRowMoves(H: SparseMatrix, weight: number, step: 1 | -1): boolean {
  const n = H.cols;
  // Signed words stay machine integers where unsigned ones may become floating point.
  const colIndex = new Int32Array(H.colIndex.buffer, H.colIndex.byteOffset, H.colIndex.length);
  const last = weight - 1;
  for (let r = 1; r < n; r++) {
    // Going down the rows for +1, up them for −1: the later row is the earlier one moved right.
    const from = (step === 1 ? r - 1 : r) * weight;
    const to = (step === 1 ? r : r - 1) * weight;
    const wraps = weight > 0 && colIndex[from + last] === n - 1 ? 1 : 0;
    if (wraps && colIndex[to] !== 0) return false;
    let differences = 0;
    const end = from + weight - wraps;
    for (let a = from, b = to + wraps; a < end; a++, b++) differences |= (colIndex[b]! - colIndex[a]!) ^ 1;
    if (differences !== 0) return false;
  }
  return true;
}

/** One row of each orbit under the cyclic shift c → c + 1 (mod n), when the shift maps the set of rows onto itself;
 *  null when it does not. The null space of such a matrix is a cyclic code. */
export function cyclicGenerators(H: SparseMatrix): Uint32Array[] | null {
  const circulant = circulantOf(H);
  if (circulant) return [circulant.offsets];
  if (H.rows === 0 || H.cols === 0) return null;
  const find = rowIndex(H);
  const seen = new Uint8Array(H.rows);
  const generators: Uint32Array[] = [];
  for (let i = 0; i < H.rows; i++) {
    if (seen[i]) continue;
    generators.push(rowOf(H, i).slice());
    for (let at = i; !seen[at]; ) {
      seen[at] = 1;
      const next = find(rowOf(H, at).map((c) => (c + 1 === H.cols ? 0 : c + 1)));
      if (next < 0) return null;
      at = next;
    }
  }
  return generators;
}

/** Rank of a matrix whose rows are closed under the cyclic shift: n − deg gcd(h₁(x), …, x^n + 1), since the rows span
 *  the ideal that this gcd generates (MacWilliams and Sloane 1977, ch. 7). Null for any other matrix. */
export function cyclicRank(H: SparseMatrix): number | null {
  const generators = cyclicGenerators(H);
  if (!generators) return null;
  return H.cols - degreeOf(rowIdeal(H.cols, generators));
}

/** The generator of the ideal spanned by the given rows in GF(2)[x]/(x^n + 1). */
export function rowIdeal(n: number, generators: readonly Uint32Array[]): Gf2Polynomial {
  return generators.reduce<Gf2Polynomial>(
    (g, offsets) => (offsets.length > 0 ? gcdPolynomials(g, polynomialOf(offsets)) : g),
    xToTheNMinusOne(n),
  );
}
