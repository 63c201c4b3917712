import { z } from 'zod';
import { independentRows } from '../../gf2/independent-rows.ts';
import { selectRows } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

/** Drops each row that the rows above it span. The code stays the same; its decoders have fewer checks to hear. */
export const dropDependentRows = defineTransform({
  kind: 'drop-dependent-rows',
  title: 'Drop dependent rows',
  schema: z.strictObject({ kind: z.literal('drop-dependent-rows') }),
  apply: (state) => selectRows(state, independentRows(state.H)),
});
