import { z } from 'zod';

const iterations = z.int('a whole number of iterations from 1 to 1000').min(1).max(1000).optional();
const threshold = z.int('a whole number of checks').min(1).optional();

const simple = [
  z.strictObject({ kind: z.literal('majority-logic') }),
  z.strictObject({ kind: z.literal('gallager-a'), iterations }),
  z.strictObject({
    kind: z.literal('gallager-b'),
    iterations,
    /** One for all iterations, or one an iteration, the last standing for the rest. */
    threshold: z.union([z.int().min(1), z.array(z.int().min(1)).min(1).max(1000)]).optional(),
  }),
  z.strictObject({ kind: z.literal('bit-flipping'), iterations, threshold }),
  z.strictObject({ kind: z.literal('bit-flipping-max'), iterations }),
  z.strictObject({
    kind: z.literal('gradient-descent'),
    iterations,
    flips: z.enum(['single', 'multi']).optional(),
    threshold: z.number().min(-1000).max(1000).optional(),
  }),
  z.strictObject({
    kind: z.literal('finite-alphabet'),
    iterations,
    /** Bit-node table for received 0, 7 × 7 entries from −3 to 3; the published one unless given. */
    table: z
      .array(z.array(z.int().min(-3).max(3)).length(7))
      .length(7)
      .optional(),
  }),
  z.strictObject({ kind: z.literal('peeling') }),
  z.strictObject({ kind: z.literal('elimination') }),
  z.strictObject({ kind: z.literal('sum-product'), iterations, designP: z.number().gt(0).lt(0.5).optional() }),
  z.strictObject({
    kind: z.literal('min-sum'),
    iterations,
    schedule: z.enum(['layered', 'flooding']).optional(),
    scale: z.enum(['1/8', '1/4', '1/2', '3/4', '1', 'offset-1']).optional(),
    c: z.int().min(1).max(126).optional(),
    rMax: z.int().min(1).max(126).optional(),
  }),
] as const;

const stage = z.discriminatedUnion('kind', simple);
/** Every decoder a run may name; definitions in DEVELOPERS.md and at each decoder's file. */
export const decoderSchema = z.discriminatedUnion('kind', [
  ...simple,
  /** The second decodes the frames that the first left unconverged. */
  z.strictObject({ kind: z.literal('two-stage'), stages: z.array(stage).min(2).max(4) }),
]);
export type DecoderSpec = z.infer<typeof decoderSchema>;
