/** How a kernel walks a matrix: as a circulant, offsets in the instructions themselves, or by tables of places; rows and
 *  columns of one weight together, so that each weight has its own unrolled code. */

import { rowOf, type SparseMatrix } from '../codes/sparse-matrix.ts';

/** Rows (or columns) that share one piece of code. `weight` is null for the mixed rest, whose weights the code reads
 *  from the table. */
export interface WeightClass {
  weight: number | null;
  from: number;
  to: number;
  /** The kernel's constants for these columns (thresholds); empty for rows and for the mixed rest. */
  settings: readonly number[];
}

export interface GraphPlan {
  H: SparseMatrix;
  /** Columns of row 0, when row j is row 0 moved by j places (mod n); rows in any circulant order otherwise do not
   *  count. */
  circulant: readonly number[] | null;
  /** Row at each place of the kernel's own order, class by class. */
  rowOrder: Uint32Array;
  rowClasses: readonly WeightClass[];
  columnOrder: Uint32Array;
  columnClasses: readonly WeightClass[];
  /** Whether the kernel's order of columns is that of the matrix. */
  plainColumns: boolean;
  largestColumn: number;
  largestRow: number;
  /** The kernel's constants a column, as given. */
  settings: readonly Uint32Array[];
}

/** Longest row or column whose code is unrolled, and most classes with code of their own. */
const longestUnrolled = 300;
const mostClasses = 10;

/** @param settings Lists of a constant for each column; columns of one class agree in all of them.
 *  @param rowsInOrder Keeps rows in index order, for schedules that depend on it. */
export function planGraph(
  H: SparseMatrix,
  settings: readonly Uint32Array[] = [],
  { rowsInOrder = false }: { rowsInOrder?: boolean } = {},
): GraphPlan {
  const degrees = new Uint32Array(H.cols);
  for (const j of H.colIndex) degrees[j]!++;
  const weights = Uint32Array.from({ length: H.rows }, (_, i) => H.rowStart[i + 1]! - H.rowStart[i]!);
  const circulant = circulantOffsets(H, rowsInOrder);
  const byWeight = classify(weights, [], rowsInOrder);
  const byDegree = classify(degrees, settings, false);
  return {
    H,
    circulant: circulant && byDegree.classes.length === 1 ? circulant : null,
    rowOrder: byWeight.order,
    rowClasses: byWeight.classes,
    columnOrder: byDegree.order,
    columnClasses: byDegree.classes,
    plainColumns: byDegree.order.every((j, s) => j === s),
    largestColumn: largest(degrees),
    largestRow: largest(weights),
    settings,
  };
}

const largest = (values: Uint32Array): number => values.reduce((most, value) => Math.max(most, value), 0);

/** Row 0's columns when row j is {d + j} or {d − j} (mod n) for all j. The second kind is the first with its rows
 *  counted backwards, which only schedules in index order could tell apart; those do not ask. */
function circulantOffsets(H: SparseMatrix, forwardsOnly: boolean): number[] | null {
  const n = H.cols;
  if (H.rows !== n || n < 2) return null;
  const first = [...rowOf(H, 0)];
  if (first.length === 0 || first.length > longestUnrolled || H.colIndex.length !== n * first.length) return null;
  const isMoved = (sign: 1 | -1) => {
    for (let j = 1; j < n; j++) {
      const row = rowOf(H, j);
      if (row.length !== first.length) return false;
      const moved = first.map((d) => (d + sign * j + n) % n).sort((a, b) => a - b);
      for (let t = 0; t < row.length; t++) if (row[t] !== moved[t]) return false;
    }
    return true;
  };
  return isMoved(1) || (!forwardsOnly && isMoved(-1)) ? first : null;
}

/** Groups rows by weight and settings; the commonest groups get code of their own, the rest is mixed. */
function classify(weights: Uint32Array, settings: readonly Uint32Array[], inOrder: boolean) {
  const weightOf = (members: readonly number[]) => weights[members[0]!]!;
  const key = (i: number) => [weights[i]!, ...settings.map((list) => list[i]!)].join();
  const groups = new Map<string, number[]>();
  for (let i = 0; i < weights.length; i++) {
    const name = key(i);
    const members = groups.get(name);
    if (members) members.push(i);
    else groups.set(name, [i]);
  }
  if (inOrder && groups.size > 1) return { order: identity(weights.length), classes: [mixedClass(0, weights.length)] };
  const own = [...groups.values()]
    .filter((members) => weightOf(members) <= longestUnrolled)
    .sort((a, b) => b.length * weightOf(b) - a.length * weightOf(a))
    .slice(0, mostClasses);
  const chosen = new Set(own);
  const rest = [...groups.values()].filter((members) => !chosen.has(members)).flat();
  const order = Uint32Array.from([...own.flat(), ...rest]);
  const classes: WeightClass[] = [];
  let from = 0;
  for (const members of own) {
    const [i] = members as [number];
    const values = settings.map((list) => list[i]!);
    classes.push({ weight: weights[i]!, from, to: from + members.length, settings: values });
    from += members.length;
  }
  if (rest.length > 0) classes.push(mixedClass(from, weights.length));
  return { order, classes };
}

const mixedClass = (from: number, to: number): WeightClass => ({ weight: null, from, to, settings: [] });
const identity = (length: number) => Uint32Array.from({ length }, (_, i) => i);
