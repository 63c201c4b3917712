import { matrixFromRows, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';

/** Planar difference sets, developed modulo v into the lines of PG(2, q). Singer, Trans. Amer. Math. Soc. 43 (1938);
 *  these representatives were computed and checked (every difference once) for the reference data of this project. */
export const planarDifferenceSets = {
  2: { v: 7, set: [0, 1, 3] },
  4: { v: 21, set: [0, 1, 4, 14, 16] },
} as const;

/** Row i is the set moved i places: {(d + i) mod v}. */
export function developed(v: number, set: readonly number[]): SparseMatrix {
  return matrixFromRows(
    v,
    Array.from({ length: v }, (_, i) => set.map((d) => (d + i) % v)),
  );
}
