import type { Citation } from '../../errors.ts';

/** Where a table row comes from. `checked`: the value was computed again beside the published one, both ends. `recalled`:
 *  written down from memory of the published table and not computed again, so nothing is called proved on its word. */
export type RowStatus = 'checked' | 'recalled';

/** One published A(n, d, w). */
export interface SizeRow {
  n: number;
  d: number;
  w: number;
  size: number;
  /** The words that reach it. */
  reachedBy: string;
  status: RowStatus;
}

export const SIZE_TABLE_SOURCE: Citation = {
  authors: 'A. E. Brouwer, J. B. Shearer, N. J. A. Sloane, W. D. Smith',
  year: 1990,
  title: 'A new table of constant weight codes',
  where: 'IEEE Trans. Inf. Theory 36, 1334–1380',
};

const GOLAY = 'words of the extended Golay code with fixed values on part of an octad';

/** Published sizes for w ≤ n/2 which no theorem of exact-sizes.ts gives. Each `checked` row meets Johnson's refined bound,
 *  so it is largest whatever the table says. */
export const SIZE_TABLE: readonly SizeRow[] = [
  ...checked([
    [11, 6, 5, 11, 'blocks of the biplane 2-(11, 5, 2)'],
    [15, 8, 7, 15, 'blocks of the Hadamard design 2-(15, 7, 3)'],
    [16, 8, 6, 16, GOLAY],
    [19, 8, 6, 28, GOLAY],
    [20, 8, 5, 16, GOLAY],
    [20, 8, 6, 40, GOLAY],
    [21, 8, 7, 120, GOLAY],
    [21, 8, 8, 210, GOLAY],
    [22, 8, 7, 176, GOLAY],
    [23, 8, 8, 506, GOLAY],
    [21, 8, 5, 21, 'lines of the plane of order 4, S(2, 5, 21)'],
    [17, 6, 5, 68, 'circles of the inversive plane of order 4, S(3, 5, 17)'],
    [26, 8, 6, 130, 'circles of the inversive plane of order 5, S(3, 6, 26)'],
    [22, 8, 6, 77, 'blocks of S(3, 6, 22)'],
    [11, 4, 5, 66, 'blocks of S(4, 5, 11)'],
    [23, 8, 7, 253, 'blocks of S(4, 7, 23)'],
    [12, 4, 6, 132, 'blocks of S(5, 6, 12)'],
    [24, 4, 6, 7084, 'blocks of S(5, 6, 24)'],
    [24, 8, 8, 759, 'octads, S(5, 8, 24)'],
    [57, 14, 8, 57, 'lines of the plane of order 7, S(2, 8, 57)'],
  ]),
  ...recalled([
    [10, 4, 5, 36],
    [12, 4, 5, 80],
    [13, 4, 5, 123],
    [10, 6, 5, 6],
    [12, 6, 5, 12],
    [12, 6, 6, 22],
    [13, 6, 5, 18],
    [13, 6, 6, 26],
    [14, 6, 5, 28],
    [14, 6, 6, 42],
    [14, 6, 7, 42],
    [15, 6, 5, 42],
    [15, 6, 6, 70],
    [15, 6, 7, 78],
    [16, 6, 6, 112],
    [16, 6, 8, 150],
    [16, 8, 8, 30],
  ]),
];

type CheckedRow = [n: number, d: number, w: number, size: number, reachedBy: string];
type RecalledRow = [n: number, d: number, w: number, size: number];

function checked(rows: readonly CheckedRow[]): SizeRow[] {
  return rows.map(([n, d, w, size, reachedBy]) => ({ n, d, w, size, reachedBy, status: 'checked' }));
}

function recalled(rows: readonly RecalledRow[]): SizeRow[] {
  return rows.map(([n, d, w, size]) => ({ n, d, w, size, reachedBy: 'the published table', status: 'recalled' }));
}
