import { z } from 'zod';
import { matrixFromRows, rowOf } from '../sparse-matrix.ts';
import { defineTransform } from './transform-kind.ts';

/** Adds one bit that makes every word even: an odd distance rises by one. Its check meets every bit. */
export const extendByParity = defineTransform({
  kind: 'extend-by-parity',
  title: 'Extend by an overall parity bit',
  schema: z.strictObject({ kind: z.literal('extend-by-parity') }),
  apply({ H }) {
    const rows = Array.from({ length: H.rows }, (_, r): ArrayLike<number> => rowOf(H, r));
    rows.push(Uint32Array.from({ length: H.cols + 1 }, (_, c) => c));
    return { H: matrixFromRows(H.cols + 1, rows) };
  },
});
