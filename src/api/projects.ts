import { z } from 'zod';
import { channelSchema } from '@/core/channels/channel.ts';
import { decoderSchema } from '@/core/decoders/decoder-spec.ts';

/** What a member may do in a project; each rank includes reading. */
export const projectRoleSchema = z.enum(['owner', 'engineer', 'reviewer', 'viewer']);
export type ProjectRole = z.infer<typeof projectRoleSchema>;

const name = z
  .string('a name')
  .trim()
  .min(1, 'a name of 1 to 120 characters')
  .max(120, 'a name of 1 to 120 characters');

export const newProjectSchema = z.strictObject({
  name,
  description: z.string().max(2000, 'at most 2000 characters').optional(),
});

export const projectSchema = z.object({
  id: z.string(),
  name: z.string(),
  description: z.string(),
  /** Seeded scenario of our own invention. */
  isDemo: z.boolean(),
  /** The reader's role in it. */
  role: projectRoleSchema,
  createdAt: z.string(),
  /** State of the seven steps, for the ruler. */
  counts: z.object({
    requirements: z.number(),
    codes: z.number(),
    runs: z.number(),
    runsUnderWay: z.number(),
    signOffs: z.number(),
    signOffsOpen: z.number(),
    releases: z.number(),
  }),
});
export type Project = z.infer<typeof projectSchema>;

/** What the link or the medium needs. All optional but one target. */
export const requirementsSchema = z
  .strictObject({
    summary: z.string().max(4000).optional(),
    channel: channelSchema.optional(),
    targetBer: z.number().gt(0).lt(1).optional(),
    targetFer: z.number().gt(0).lt(1).optional(),
    targetUber: z.number().gt(0).lt(1).optional(),
    payloadBits: z.int().min(1).max(10_000_000).optional(),
    parityBits: z.int().min(1).max(10_000_000).optional(),
    lengthMin: z.int().min(1).max(10_000_000).optional(),
    lengthMax: z.int().min(1).max(10_000_000).optional(),
    rateMin: z.number().gt(0).lt(1).optional(),
    structure: z.enum(['cyclic', 'quasi-cyclic', 'any']).optional(),
    columnWeightMax: z.int().min(1).max(1000).optional(),
    decoder: decoderSchema.optional(),
  })
  .refine((r) => r.targetBer !== undefined || r.targetFer !== undefined || r.targetUber !== undefined, {
    message: 'at least one target: BER, FER or UBER',
    path: ['targetFer'],
  })
  .refine((r) => r.lengthMin === undefined || r.lengthMax === undefined || r.lengthMin <= r.lengthMax, {
    message: 'a greatest length that is not below the least',
    path: ['lengthMax'],
  });
export type Requirements = z.infer<typeof requirementsSchema>;
