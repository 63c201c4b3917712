import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { selectColumns, selectRows } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

/** Keeps some parallel classes of a resolvable design: of its rows where blocks are checks, of its columns where blocks
 *  are bits. `classes` is a list, or how many of the first. */
export const keepClasses = defineTransform({
  kind: 'keep-classes',
  title: 'Keep parallel classes',
  schema: z.strictObject({
    kind: z.literal('keep-classes'),
    classes: z.union([z.int().min(1), z.array(z.int().min(0)).min(1)]),
  }),
  apply(state, { classes }) {
    const labels = state.rowClasses ?? state.columnClasses;
    if (!labels) throw new ParamError('transforms.keep-classes', 'no classes', 'a design given with parallel classes');
    const known = [...new Set(labels)].sort((a, b) => a - b);
    const wanted = new Set(typeof classes === 'number' ? known.slice(0, classes) : classes);
    if (typeof classes === 'number' && classes > known.length) {
      throw new ParamError('classes', classes, `from 1 to ${known.length} classes`);
    }
    for (const label of wanted) {
      if (!known.includes(label)) throw new ParamError('classes', label, `classes from ${known[0]} to ${known.at(-1)}`);
    }
    const kept = Array.from(labels.keys()).filter((i) => wanted.has(labels[i]!));
    return state.rowClasses ? selectRows(state, kept) : selectColumns(state, kept);
  },
});
