import { matrixFromRows, rowOf, type SparseMatrix } from '../sparse-matrix.ts';
import type { TransformState } from './transform-kind.ts';

/** The rows named, in the order named. */
export function selectRows({ H, rowClasses, columnClasses }: TransformState, rows: ArrayLike<number>): TransformState {
  const kept = Array.from(rows);
  return {
    H: matrixFromRows(
      H.cols,
      kept.map((r) => rowOf(H, r)),
    ),
    rowClasses: rowClasses && Uint32Array.from(kept, (r) => rowClasses[r]!),
    columnClasses,
  };
}

/** The columns named, in the order named; rows that are left empty check nothing and are dropped. */
export function selectColumns(
  { H, rowClasses, columnClasses }: TransformState,
  columns: ArrayLike<number>,
): TransformState {
  const kept = Array.from(columns);
  const place = new Int32Array(H.cols).fill(-1);
  kept.forEach((c, i) => {
    place[c] = i;
  });
  const rows = Array.from({ length: H.rows }, (_, r) =>
    rowOf(H, r)
      .filter((c) => place[c]! >= 0)
      .map((c) => place[c]!),
  );
  const full = rows.flatMap((row, r) => (row.length > 0 ? [r] : []));
  return {
    H: matrixFromRows(
      kept.length,
      full.map((r) => rows[r]!),
    ),
    rowClasses: rowClasses && Uint32Array.from(full, (r) => rowClasses[r]!),
    columnClasses: columnClasses && Uint32Array.from(kept, (c) => columnClasses[c]!),
  };
}

/** Numbers 0 … n − 1 without those listed. */
export function without(n: number, dropped: Iterable<number>): number[] {
  const gone = new Set(dropped);
  return Array.from({ length: n }, (_, i) => i).filter((i) => !gone.has(i));
}

/** Ones of a matrix by column, each a list of rows. */
export function columnsOf(H: SparseMatrix): number[][] {
  const columns: number[][] = Array.from({ length: H.cols }, () => []);
  for (let r = 0; r < H.rows; r++) for (const c of rowOf(H, r)) columns[c]!.push(r);
  return columns;
}
