import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { matrixFromRows, rowOf } from '../sparse-matrix.ts';
import { columnsOf, without } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

/** Leaves out bits that are not sent: n falls, k stays as long as no codeword lies within them. The checks of the punctured
 *  code are the sums of rows that are zero there, so rows fill in and short cycles appear. */
export const puncture = defineTransform({
  kind: 'puncture',
  title: 'Puncture',
  schema: z.strictObject({ kind: z.literal('puncture'), columns: z.array(z.int().min(0)).min(1) }),
  apply({ H }, { columns }) {
    const rows = Array.from({ length: H.rows }, (_, r) => new Set(rowOf(H, r)));
    const met = columnsOf(H).map((ones) => new Set(ones));
    for (const column of columns) {
      if (column >= H.cols) throw new ParamError('columns', column, `columns from 0 to ${H.cols - 1}`);
      eliminate(rows, met, column);
    }
    const kept = without(H.cols, columns);
    if (kept.length === 0) throw new ParamError('columns', columns.length, `fewer than all ${H.cols} columns`);
    const name = new Map(kept.map((c, i) => [c, i]));
    return {
      H: matrixFromRows(
        kept.length,
        rows.flatMap((row) => (row.size > 0 ? [Array.from(row, (c) => name.get(c)!)] : [])),
      ),
    };
  },
});

/** Adds the lightest row at the column to the others there, then empties it. */
function eliminate(rows: Set<number>[], met: Set<number>[], column: number): void {
  const there = [...met[column]!].sort((a, b) => rows[a]!.size - rows[b]!.size);
  const pivot = there[0];
  if (pivot === undefined) return;
  const ones = [...rows[pivot]!];
  const toggle = (r: number, c: number) => {
    if (!rows[r]!.delete(c)) rows[r]!.add(c);
    if (!met[c]!.delete(r)) met[c]!.add(r);
  };
  for (const r of there) for (const c of ones) toggle(r, c);
}
