import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { matrixFromRows, type SparseMatrix, transpose } from '../sparse-matrix.ts';
import { columnsOf } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

const parts = z.int().min(2).max(64);

/** Splits each column into `parts` columns and deals its ones out to them in turn: longer codes of higher rate whose cycles
 *  are those of the old matrix that survive the cut (Kou, Lin and Fossorier 2001, §VI). Girth cannot fall. */
export const splitColumns = defineTransform({
  kind: 'split-columns',
  title: 'Split columns',
  schema: z.strictObject({ kind: z.literal('split-columns'), parts }),
  apply: ({ H, rowClasses }, { parts }) => ({ H: withSplitColumns(H, parts), rowClasses }),
});

/** Splits each row in the same way: lower column degree of the checks, lower rate. */
export const splitRows = defineTransform({
  kind: 'split-rows',
  title: 'Split rows',
  schema: z.strictObject({ kind: z.literal('split-rows'), parts }),
  apply: ({ H, columnClasses }, { parts }) => ({ H: transpose(withSplitColumns(transpose(H), parts)), columnClasses }),
});

function withSplitColumns(H: SparseMatrix, parts: number): SparseMatrix {
  const rows: number[][] = Array.from({ length: H.rows }, () => []);
  columnsOf(H).forEach((ones, c) => {
    if (ones.length < parts) {
      throw new ParamError('parts', parts, `at most the least weight, ${ones.length} at line ${c}`);
    }
    ones.forEach((r, i) => {
      rows[r]!.push(c * parts + (i % parts));
    });
  });
  return matrixFromRows(H.cols * parts, rows);
}
