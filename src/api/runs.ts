import { z } from 'zod';
import { channelSchema } from '@/core/channels/channel.ts';
import { decoderSchema } from '@/core/decoders/decoder-spec.ts';
import { tallySchema } from '@/core/simulation/tally.ts';

/** A point is finished at so many frame errors, or at so many frames, whichever comes first. */
export const stoppingSchema = z.strictObject({
  frameErrors: z.int('a whole number of frame errors from 1 to 1 000 000').min(1).max(1_000_000),
  maxFrames: z.int('a whole number of frames from 1 to 10^12').min(1).max(1e12),
});
export type Stopping = z.infer<typeof stoppingSchema>;

export const newRunSchema = z.strictObject({
  name: z.string('a name of 1 to 120 characters').trim().min(1, 'a name of 1 to 120 characters').max(120),
  seed: z.string('a text of 1 to 200 characters').min(1, 'a text of 1 to 200 characters').max(200),
  framesPerShard: z
    .int('a whole number of frames from 1 to 10 000 000')
    .min(1, 'at least 1 frame a shard')
    .max(10_000_000),
  stopping: stoppingSchema,
  place: z.enum(['browser', 'server', 'fleet']),
  points: z
    .array(z.strictObject({ codeId: z.string(), channel: channelSchema, decoder: decoderSchema }))
    .min(1, 'at least one point')
    .max(100_000),
});
export type NewRun = z.infer<typeof newRunSchema>;

export const runStateSchema = z.enum(['ready', 'running', 'paused', 'stopped', 'finished']);
export type RunState = z.infer<typeof runStateSchema>;

export const runSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  name: z.string(),
  seed: z.string(),
  framesPerShard: z.number(),
  stopping: stoppingSchema,
  place: z.enum(['browser', 'server', 'fleet']),
  state: runStateSchema,
  createdAt: z.string(),
  createdBy: z.string(),
  /** Computed by this engine from the stored seed as part of the demo. */
  isDemo: z.boolean(),
  pointCount: z.number(),
  pointsDone: z.number(),
  frames: z.number(),
  frameErrors: z.number(),
  /** Grows with every change of the run or of one of its points. */
  revision: z.number(),
});
export type Run = z.infer<typeof runSchema>;

const intervalSchema = z.object({ lower: z.number(), upper: z.number() });
export const pointSchema = z.object({
  id: z.string(),
  runId: z.string(),
  codeId: z.string(),
  /** "(273,191) projective plane, q = 16". */
  codeLabel: z.string(),
  n: z.number(),
  k: z.number(),
  channel: channelSchema,
  decoder: decoderSchema,
  tally: tallySchema,
  /** Shard indices accepted so far are 0 … nextIndex − 1 and those in `extra`. */
  nextIndex: z.number(),
  extra: z.array(z.number()),
  done: z.boolean(),
  fer: z.number(),
  ber: z.number(),
  /** Clopper–Pearson on FER at `level`; with no error seen, lower is 0 and upper the one-sided limit. */
  interval: intervalSchema,
  berInterval: intervalSchema,
  level: z.number(),
});
export type Point = z.infer<typeof pointSchema>;

export const shardSchema = z.strictObject({ pointId: z.string(), index: z.int().min(0).max(1e9), tally: tallySchema });
export const shardBatchSchema = z.strictObject({ shards: z.array(shardSchema).min(1, 'at least one shard').max(500) });
export const shardReceiptSchema = z.object({
  accepted: z.number(),
  duplicates: z.number(),
  conflicts: z.array(z.object({ pointId: z.string(), index: z.number() })),
});
export const runPatchSchema = z.strictObject({
  state: z.enum(['running', 'paused', 'stopped']).optional(),
  name: z.string().trim().min(1).max(120).optional(),
});

export const pointsQueryParams = z.object({
  after: z.string().optional(),
  limit: z.coerce.number().int().min(1).max(500).optional(),
  /** JSON comes in pages; CSV is the whole list. Without it the Accept header chooses. */
  format: z.enum(['json', 'csv']).optional(),
});
/** Data of a `run` event: the run, and those of its points that have changed since the revision that the watcher has
 *  seen. The event's id is the run's revision. */
export const runEventSchema = z.object({ run: runSchema, points: z.array(pointSchema) });
export const runEventsQueryParams = z.object({
  /** The revision seen; the header Last-Event-ID, which a browser sends when it reconnects, goes before. */
  since: z.coerce.number('a revision: a whole number from 0').int().min(0).optional(),
});
const secondsAccepted = 'a whole number of seconds from 0 to 60';
export const waitQueryParams = z.object({
  seconds: z.coerce.number(secondsAccepted).int(secondsAccepted).min(0, secondsAccepted).max(60, secondsAccepted),
});
