import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { matrixFromRows, rowOf } from '../sparse-matrix.ts';
import { defineTransform } from './transform-kind.ts';

const constituent = z.strictObject({ cols: z.int().min(1), rows: z.array(z.array(z.int().min(0))).min(1) });

/** Replaces each one by a constituent matrix and each zero by a zero matrix of that size; the ones of a row take the
 *  constituents in turn, starting one further in each row (superposition, Lin and Costello 2004, §17.14). Girth 6 holds
 *  when base and constituents have it and no two constituents of a line share two ones; it is computed afterwards. */
export const superpose = defineTransform({
  kind: 'superpose',
  title: 'Superpose constituents',
  schema: z.strictObject({ kind: z.literal('superpose'), constituents: z.array(constituent).min(1).max(256) }),
  apply({ H }, { constituents }) {
    const parts = constituents.map(({ cols, rows }) => matrixFromRows(cols, rows));
    const [{ rows: high, cols: wide }] = parts as [(typeof parts)[0]];
    const odd = parts.find((part) => part.rows !== high || part.cols !== wide);
    if (odd) throw new ParamError('constituents', `${odd.rows} × ${odd.cols}`, `matrices all of ${high} × ${wide}`);
    const rows: number[][] = Array.from({ length: H.rows * high }, () => []);
    for (let r = 0; r < H.rows; r++) {
      rowOf(H, r).forEach((c, i) => {
        const part = parts[(r + i) % parts.length]!;
        for (let x = 0; x < high; x++) for (const y of rowOf(part, x)) rows[r * high + x]!.push(c * wide + y);
      });
    }
    return { H: matrixFromRows(H.cols * wide, rows) };
  },
});
