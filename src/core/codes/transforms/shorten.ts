import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { systematicEncoder } from '../encode/systematic-encoder.ts';
import { selectColumns, without } from './select-lines.ts';
import { defineTransform } from './transform-kind.ts';

/** Fixes `bits` information bits at zero and leaves them out: n and k both fall by exactly that many, and the distance does
 *  not fall. The bits are the last of an information set, so that no parity is lost. */
export const shorten = defineTransform({
  kind: 'shorten',
  title: 'Shorten',
  schema: z.strictObject({ kind: z.literal('shorten'), bits: z.int().min(1) }),
  apply(state, { bits }) {
    const { k, infoPositions } = systematicEncoder(state);
    if (bits >= k) throw new ParamError('bits', bits, `from 1 to ${k - 1}, fewer than the code's dimension`);
    return selectColumns(state, without(state.H.cols, infoPositions.subarray(k - bits)));
  },
});
