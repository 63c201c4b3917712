import { LimitError } from '../errors.ts';

/** What a file may ask for before memory is taken. */
export const matrixLimits = { rows: 1_000_000, cols: 1_000_000, ones: 50_000_000 } as const;

/** @throws LimitError naming the size that passes its limit. */
export function refuseBeyondLimits(rows: number, cols: number, ones: number): void {
  if (rows > matrixLimits.rows) throw new LimitError('rows', rows, matrixLimits.rows, 'rows');
  if (cols > matrixLimits.cols) throw new LimitError('columns', cols, matrixLimits.cols, 'columns');
  if (ones > matrixLimits.ones) throw new LimitError('ones', ones, matrixLimits.ones, 'ones');
}
