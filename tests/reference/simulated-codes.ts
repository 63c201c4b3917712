import { matrixFromRows, type SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';
import { developed } from './difference-sets.ts';

/** The matrices of the reference points, from the figures printed with them, by the short name of each code. Planar
 *  difference sets: Singer 1938. Difference family (37,4,1): base blocks as computed for the reference data. Tanner
 *  (155,64): Tanner, Sridhara and Fuja, ISTA 2001 (shifts quoted from memory there; rank, girth and rates agree).
 *  IEEE 802.11 n = 648, rate 1/2: IEEE Std 802.11, Annex F. */
export const simulatedCodes: Record<string, () => SparseMatrix> = {
  pg8: () => developed(73, [0, 1, 3, 7, 15, 31, 36, 54, 63]),
  pg16: () => developed(273, [0, 1, 3, 7, 15, 31, 63, 90, 116, 127, 136, 181, 194, 204, 233, 238, 255]),
  cdf37_4: () =>
    fromColumns(37, [
      [0, 1, 3, 24],
      [0, 4, 9, 15],
      [0, 7, 17, 25],
    ]),
  arr7_3: arrayCode,
  tanner155: () =>
    lifted(31, [
      [1, 2, 4, 8, 16],
      [5, 10, 20, 9, 18],
      [25, 19, 7, 14, 28],
    ]),
  wifi648_12: () => lifted(27, wifi648Rows),
};

/** Circulants whose column j has its ones in rows (b + j) mod size, side by side. */
function fromColumns(size: number, bases: readonly (readonly number[])[]): SparseMatrix {
  const rows: number[][] = Array.from({ length: size }, () => []);
  bases.forEach((base, s) => {
    for (let j = 0; j < size; j++) for (const b of base) rows[(b + j) % size]!.push(s * size + j);
  });
  return matrixFromRows(bases.length * size, rows);
}

/** Row (i, x) meets bit (m, b) where x = i·m + b mod 7. */
function arrayCode(): SparseMatrix {
  const rows: number[][] = [];
  for (let i = 0; i < 3; i++)
    for (let x = 0; x < 7; x++) rows.push(Array.from({ length: 7 }, (_, m) => 7 * m + ((((x - i * m) % 7) + 7) % 7)));
  return matrixFromRows(49, rows);
}

/** Each entry of the table is an identity moved right by that many places, or nothing where it is below 0. */
function lifted(size: number, table: readonly (readonly number[])[]): SparseMatrix {
  return matrixFromRows(
    size * table[0]!.length,
    table.flatMap((shifts) =>
      Array.from({ length: size }, (_, i) =>
        shifts.flatMap((shift, block) => (shift < 0 ? [] : [block * size + ((i + shift) % size)])),
      ),
    ),
  );
}

const wifi648Rows = [
  '0 - - - 0 0 - - 0 - - 0 1 0 - - - - - - - - - -',
  '22 0 - - 17 - 0 0 12 - - - - 0 0 - - - - - - - - -',
  '6 - 0 - 10 - - - 24 - 0 - - - 0 0 - - - - - - - -',
  '2 - - 0 20 - - - 25 0 - - - - - 0 0 - - - - - - -',
  '23 - - - 3 - - - 0 - 9 11 - - - - 0 0 - - - - - -',
  '24 - 23 1 17 - 3 - 10 - - - - - - - - 0 0 - - - - -',
  '25 - - - 8 - - - 7 18 - - 0 - - - - - 0 0 - - - -',
  '13 24 - - 0 - 8 - 6 - - - - - - - - - - 0 0 - - -',
  '7 20 - 16 22 10 - - 23 - - - - - - - - - - - 0 0 - -',
  '11 - - - 19 - - - 13 - 3 17 - - - - - - - - - 0 0 -',
  '25 - 8 - 23 18 - 14 9 - - - - - - - - - - - - - 0 0',
  '3 - - - 16 - - 2 25 5 - - 1 - - - - - - - - - - 0',
].map((line) => line.split(' ').map((entry) => (entry === '-' ? -1 : Number(entry))));
