import type { SparseMatrix } from '../sparse-matrix.ts';
import { closedWalkCounter } from './long-cycles.ts';
import { shortCycles } from './short-cycles.ts';
import type { Orbits, TannerOrbits } from './tanner-orbits.ts';
import { tannerSides } from './walks.ts';

/** Cycles of the Tanner graph by length, for the lengths that could be counted exactly. */
export interface CycleCounts {
  /** Length to number of cycles; a bigint where the number passes 2^53. */
  total: Map<number, number | bigint>;
  /** Length to number of cycles through each column. */
  perColumn: Map<number, Float64Array>;
  /** Why the count stops before the length asked for, when it does. */
  stoppedBy?: 'length limit of the method' | 'numbers past 2^53' | 'work limit';
}

/** Edges walked in one count at most unless more are asked for, a few seconds. */
export const CYCLE_WORK_LIMIT = 4e8;

/** Exact numbers of cycles of lengths g to maxLength, at most 2g − 2: below 2g every closed walk that never turns back is
 *  a cycle (Karimi and Banihashemi 2012), so walks are counted, from one column of each orbit. Lengths g and g + 2 take one
 *  sweep of the graph a column, longer ones a sweep for each edge of it. */
export function countCycles(
  H: SparseMatrix,
  girth: number,
  maxLength: number,
  orbits: TannerOrbits,
  workLimit = CYCLE_WORK_LIMIT,
): CycleCounts {
  const counts: CycleCounts = { total: new Map(), perColumn: new Map() };
  if (!Number.isFinite(girth) || maxLength < girth) return counts;
  let longest = Math.min(maxLength, 2 * girth - 2);
  if (longest < maxLength) counts.stoppedBy = 'length limit of the method';
  while (longest >= girth && workOf(H, girth, longest, orbits) > workLimit) {
    longest -= 2;
    counts.stoppedBy = 'work limit';
  }
  if (longest < girth) return counts;
  const cycles = cyclesPerOrbit(H, girth, longest, orbits);
  for (let length = girth; length <= longest; length += 2) {
    const values = Float64Array.from(cycles, (found) => found.get(length)!);
    if (values.some((value) => value > Number.MAX_SAFE_INTEGER)) {
      counts.stoppedBy = 'numbers past 2^53';
      break;
    }
    counts.total.set(length, totalOf(values, orbits.columns, length));
    counts.perColumn.set(
      length,
      Float64Array.from(orbits.columns.orbitOf, (orbit) => values[orbit]!),
    );
  }
  return counts;
}

/** Length to number of cycles through the representative, for each orbit of columns. */
function cyclesPerOrbit(H: SparseMatrix, girth: number, longest: number, orbits: TannerOrbits): Map<number, number>[] {
  const sides = tannerSides(H);
  const { rows, columns } = orbits;
  if (longest <= girth + 2) {
    const count = shortCycles(sides, girth, (row) => rows.representatives[rows.orbitOf[row]!]!);
    return Array.from(columns.representatives, (column) => {
      const found = count(column);
      return new Map([
        [girth, found.girth],
        [girth + 2, found.girthPlusTwo],
      ]);
    });
  }
  const walks = closedWalkCounter(sides, longest / 2);
  return Array.from(
    columns.representatives,
    (column) => new Map(Array.from(walks(column), (closed, half) => [2 * half, closed])),
  );
}

/** Edges walked, by the average branching and capped by the whole graph at each step. */
function workOf(H: SparseMatrix, girth: number, longest: number, orbits: TannerOrbits): number {
  const edges = H.colIndex.length;
  const columnWeight = edges / H.cols;
  const rowWeight = edges / H.rows;
  let reached = columnWeight;
  let sweep = reached;
  for (let h = 2; h <= longest / 2; h++) {
    reached = Math.min(edges, reached * Math.max(1, (h % 2 === 0 ? rowWeight : columnWeight) - 1));
    sweep += 2 * reached;
  }
  const columns = orbits.columns.representatives.length;
  if (longest > girth + 2) return columns * Math.min(sweep * columnWeight, 2 * edges * longest * columnWeight);
  return (columns + orbits.rows.representatives.length) * sweep;
}

/** Each cycle of length L passes L/2 columns. */
function totalOf(values: Float64Array, orbits: Orbits, length: number): number | bigint {
  let sum = 0n;
  values.forEach((value, orbit) => {
    sum += BigInt(value) * BigInt(orbits.sizes[orbit]!);
  });
  const total = sum / BigInt(length / 2);
  return total <= BigInt(Number.MAX_SAFE_INTEGER) ? Number(total) : total;
}
