/** Incidence of a small projective plane developed from its difference set: line i holds the points d + i mod v.
 *  {0, 1, 3, 9} mod 13 gives the plane of order 3 and {0, 1, 3} mod 7 that of order 2 (Singer, Trans. AMS 43, 1938). */
export interface Lattice {
  size: number;
  /** Column and row of each incidence, row by row. */
  cells: readonly (readonly [x: number, y: number])[];
}

export function latticeOf(size: number, differences: readonly number[]): Lattice {
  const cells: [number, number][] = [];
  for (let y = 0; y < size; y++) {
    for (const d of differences) cells.push([(d + y) % size, y]);
  }
  return { size, cells };
}

export const planeOfOrder2 = latticeOf(7, [0, 1, 3]);
export const planeOfOrder3 = latticeOf(13, [0, 1, 3, 9]);
