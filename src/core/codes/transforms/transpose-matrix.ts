import { z } from 'zod';
import { transpose } from '../sparse-matrix.ts';
import { defineTransform } from './transform-kind.ts';

/** Exchanges bits and checks. */
export const transposeMatrix = defineTransform({
  kind: 'transpose',
  title: 'Transpose',
  schema: z.strictObject({ kind: z.literal('transpose') }),
  apply: ({ H, rowClasses, columnClasses }) => ({
    H: transpose(H),
    rowClasses: columnClasses,
    columnClasses: rowClasses,
  }),
});
