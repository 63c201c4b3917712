import { z } from 'zod';
import { channelSchema } from '@/core/channels/channel.ts';
import { decoderSchema } from '@/core/decoders/decoder-spec.ts';
import { tallySchema } from '@/core/simulation/tally.ts';

const frameErrorsAccepted = 'a whole number of frame errors from 1 to 1 000 000';
const maxFramesAccepted = 'a whole number of frames from 1 to 10^12';
const errorProbability = z.number('a probability above 0 and below 0.5').gt(0).lt(0.5);
const rate = (words: string) => z.number(words).gt(0, words).lt(1, words);
const levelSchema = z.number('a level from 0.5 to 0.9999').min(0.5).max(0.9999);

/** A point is finished by the first of these that it meets; `maxFrames` is always there. */
export const stoppingSchema = z.strictObject({
  frameErrors: z.int(frameErrorsAccepted).min(1, frameErrorsAccepted).max(1_000_000, frameErrorsAccepted).optional(),
  maxFrames: z.int(maxFramesAccepted).min(1, maxFramesAccepted).max(1e12, maxFramesAccepted),
  /** Both limits of the frame error rate within that factor of its estimate. */
  width: z
    .strictObject({ factor: z.number('a factor from 1.01 to 100').min(1.01).max(100), level: levelSchema })
    .optional(),
  /** Wald's sequential test of the frame error rate against a limit. */
  verdict: z
    .strictObject({
      limit: rate('a frame error rate above 0 and below 1'),
      ratio: z.number('a factor from 1.05 to 1000').min(1.05).max(1000),
      falsePass: errorProbability,
      falseFail: errorProbability,
    })
    .optional(),
  /** Time that the whole run may be worked on. */
  seconds: z.int('a whole number of seconds from 1 to 10^8').min(1).max(1e8).optional(),
});
export type Stopping = z.infer<typeof stoppingSchema>;

export const placeSchema = z.enum(['browser', 'server', 'fleet'], '"browser", "server" or "fleet"');
export type Place = z.infer<typeof placeSchema>;

const crossover = z.number('a crossover probability above 0 and at most 0.5').gt(0).max(0.5);

/** What a run is for, when its points are left to the planner. */
export const goalSchema = z.discriminatedUnion('kind', [
  /** Curves over the binary symmetric channel, from where errors are plentiful down the waterfall. */
  z.strictObject({
    kind: z.literal('curve'),
    curves: z
      .array(z.strictObject({ codeId: z.string(), decoder: decoderSchema }))
      .min(1, 'at least one curve')
      .max(100),
    from: crossover,
    to: crossover,
    /** Most points of one curve. */
    points: z.int('a whole number of points from 2 to 200').min(2).max(200),
  }),
  /** That a rate is within a limit at one p, by what happens at each number of errors. */
  z.strictObject({
    kind: z.literal('limit'),
    codeId: z.string(),
    decoder: decoderSchema,
    p: crossover,
    /** UBER is FER over the information bits of a frame. */
    rate: z.enum(['fer', 'uber']),
    target: rate('a rate above 0 and below 1'),
    level: levelSchema,
    /** Numbers of errors up to this are always corrected, by a theorem; worked out by the server. */
    radius: z.int().min(0).optional(),
  }),
]);
export type Goal = z.infer<typeof goalSchema>;

export const newRunSchema = z
  .strictObject({
    name: z.string('a name of 1 to 120 characters').trim().min(1, 'a name of 1 to 120 characters').max(120),
    seed: z.string('a text of 1 to 200 characters').min(1, 'a text of 1 to 200 characters').max(200),
    framesPerShard: z
      .int('a whole number of frames from 1 to 10 000 000')
      .min(1, 'at least 1 frame a shard')
      .max(10_000_000),
    stopping: stoppingSchema,
    /** A run of the server or the fleet begins at once; one of the browser waits for its first shard. */
    place: placeSchema,
    goal: goalSchema.optional(),
    points: z
      .array(z.strictObject({ codeId: z.string(), channel: channelSchema, decoder: decoderSchema }))
      .max(100_000)
      .default([]),
  })
  .refine(({ points, goal }) => points.length > 0 !== (goal !== undefined), {
    path: ['points'],
    error: 'at least one point, or a goal instead',
  });
export type NewRun = z.infer<typeof newRunSchema>;

export const runStateSchema = z.enum(['ready', 'running', 'paused', 'stopped', 'finished']);
export type RunState = z.infer<typeof runStateSchema>;

/** The end of a goal: what was shown, in words and figures. */
export const outcomeSchema = z.object({
  verdict: z.enum(['pass', 'fail', 'open', 'complete']),
  text: z.string(),
  estimate: z.number().optional(),
  lower: z.number().optional(),
  upper: z.number().optional(),
  level: z.number().optional(),
});
export type Outcome = z.infer<typeof outcomeSchema>;

export const runSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  name: z.string(),
  seed: z.string(),
  framesPerShard: z.number(),
  stopping: stoppingSchema,
  place: placeSchema,
  goal: goalSchema.nullable(),
  /** What a goal came to, once it is reached or given up. */
  outcome: outcomeSchema.nullable(),
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

/** How a point of a stratified run is worked off. */
export const pointPlanSchema = z.strictObject({
  /** 0 is the pilot, whose frames only plan; each later stage counts its own fresh frames. */
  stage: z.number(),
  /** Frames planned, in whole shards. */
  frames: z.number(),
  /** All patterns of the weight, so many branches of the enumeration a shard. */
  enumerate: z.strictObject({ branches: z.number(), branchesPerShard: z.number() }).optional(),
  /** Added to the run's seed, so that each stage has frames of its own. */
  stream: z.string(),
});
export type PointPlan = z.infer<typeof pointPlanSchema>;

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
  /** Why it is done: its rule on errors, frames, width or verdict; time over; or too many shards set aside. */
  stopReason: z.enum(['errors', 'frames', 'width', 'pass', 'fail', 'time', 'failed']).nullable(),
  /** For a point that stopped on errors: the estimate and exact limits that suit it (Mendo and Hernando 2006). */
  stopped: z.object({ estimate: z.number(), lower: z.number(), upper: z.number() }).nullable(),
  /** Shards that the server computed again and found the same. */
  recomputed: z.number(),
  /** Shards given up after three failures. */
  setAside: z.number(),
  plan: pointPlanSchema.nullable(),
});
export type Point = z.infer<typeof pointSchema>;

export const shardSchema = z.strictObject({ pointId: z.string(), index: z.int().min(0).max(1e9), tally: tallySchema });
/** Which tab, script or machine computed: any name that stays the same while it works. */
const workerName = z.string('a name of 1 to 80 characters').min(1).max(80);
const workerLabel = z.string('a text of at most 120 characters').max(120);
export const shardBatchSchema = z.strictObject({
  shards: z.array(shardSchema).min(1, 'at least one shard').max(500),
  source: z.strictObject({ name: workerName, label: workerLabel }).optional(),
});
export const shardReceiptSchema = z.object({
  accepted: z.number(),
  duplicates: z.number(),
  conflicts: z.array(z.object({ pointId: z.string(), index: z.number() })),
});

export const newLeasesSchema = z.strictObject({
  count: z.int('a whole number of shards from 1 to 500').min(1).max(500),
  source: z.strictObject({ name: workerName, label: workerLabel }),
});
export const leasesSchema = z.object({
  /** Shards that are this worker's to compute until they expire. */
  leases: z.array(z.object({ pointId: z.string(), index: z.number() })),
  expiresInMs: z.number(),
  /** The points that they belong to, as they stand. */
  points: z.array(pointSchema),
  /** Null when there may be work later, though none now; otherwise why there is none. */
  over: runStateSchema.nullable(),
});
export const failedShardsSchema = z.strictObject({
  failures: z
    .array(z.strictObject({ pointId: z.string(), index: z.int().min(0).max(1e9), message: z.string().max(500) }))
    .min(1, 'at least one failure')
    .max(100),
  source: z.strictObject({ name: workerName, label: workerLabel }),
});

export const runPatchSchema = z.strictObject({
  state: z.enum(['running', 'paused', 'stopped']).optional(),
  name: z.string().trim().min(1).max(120).optional(),
  /** Where the rest is computed. */
  place: placeSchema.optional(),
  /** More frame errors or frames than before: the run, finished or not, goes on from where it is. */
  extend: z
    .strictObject({
      frameErrors: z.int(frameErrorsAccepted).min(1).max(1_000_000).optional(),
      maxFrames: z.int(maxFramesAccepted).min(1).max(1e12).optional(),
    })
    .optional(),
});

export const sourceSchema = z.object({
  id: z.string(),
  kind: z.enum(['browser', 'script', 'server', 'fleet']),
  label: z.string(),
  shards: z.number(),
  frames: z.number(),
  recomputed: z.number(),
  quarantinedAt: z.string().nullable(),
  quarantinedShards: z.number(),
});
/** Where a run's shards, or one point's, were computed and what is wrong with any. */
export const provenanceSchema = z.object({
  sources: z.array(sourceSchema),
  /** Of points with the server's word: all, and those of which a shard was computed again. */
  conflicts: z.array(
    z.object({ pointId: z.string(), index: z.number(), at: z.string(), stored: tallySchema, posted: tallySchema }),
  ),
  setAside: z.array(
    z.object({ pointId: z.string(), index: z.number(), failures: z.number(), message: z.string(), at: z.string() }),
  ),
});
export const provenanceQueryParams = z.object({ pointId: z.string().optional() });

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
