import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { matrixFromRows, rowOf } from '../sparse-matrix.ts';
import { defineTransform } from './transform-kind.ts';

/** Clears the blocks of a matrix of square blocks where the mask, one row a string of 0 and 1, holds a zero. */
export const mask = defineTransform({
  kind: 'mask',
  title: 'Mask blocks',
  schema: z.strictObject({
    kind: z.literal('mask'),
    blockSize: z.int().min(1),
    mask: z.array(z.string().regex(/^[01]+$/)).min(1),
  }),
  apply({ H, rowClasses, columnClasses }, { blockSize, mask: pattern }) {
    const across = H.cols / blockSize;
    const down = H.rows / blockSize;
    if (!Number.isInteger(across) || !Number.isInteger(down)) {
      throw new ParamError('blockSize', blockSize, `a divisor of ${H.rows} rows and ${H.cols} columns`);
    }
    if (pattern.length !== down || pattern.some((line) => line.length !== across)) {
      throw new ParamError('mask', `${pattern.length} × ${pattern[0]?.length}`, `a ${down} × ${across} mask`);
    }
    const rows = Array.from({ length: H.rows }, (_, r) =>
      rowOf(H, r).filter((c) => pattern[Math.floor(r / blockSize)]![Math.floor(c / blockSize)] === '1'),
    );
    return { H: matrixFromRows(H.cols, rows), rowClasses, columnClasses };
  },
});
