import { z } from 'zod';
import { channelSchema } from '@/core/channels/channel.ts';
import { decoderSchema } from '@/core/decoders/decoder-spec.ts';
import { tallySchema } from '@/core/simulation/tally.ts';

/** What the server and the machines of the fleet say to each other through Redis. One server a Redis database: the
 *  number at the end of REDIS_URL parts several. */
export const prefix = 'blockwright';
export const queueName = 'shards';

export const keys = {
  /** The server's release, renewed as long as it lives. */
  release: `${prefix}:release`,
  /** A code's matrix, deflated. */
  matrix: (codeId: string) => `${prefix}:matrix:${codeId}`,
  /** A machine's word that it is there. */
  machine: (id: string) => `${prefix}:machine:${id}`,
  machines: `${prefix}:machine:*`,
  /** Why a machine's results are taken no more. */
  refused: (name: string) => `${prefix}:refused:${name}`,
};

export const shardJobSchema = z.object({
  release: z.string(),
  runId: z.string(),
  pointId: z.string(),
  codeId: z.string(),
  index: z.int().min(0),
  seed: z.string(),
  framesPerShard: z.int().min(1),
  rate: z.number(),
  channel: channelSchema,
  decoder: decoderSchema,
  branchesPerShard: z.int().min(1).optional(),
});
export type ShardJob = z.infer<typeof shardJobSchema>;

export const shardResultSchema = z.object({
  release: z.string(),
  machine: z.string(),
  tally: tallySchema,
  elapsedMs: z.number(),
});
export type ShardResult = z.infer<typeof shardResultSchema>;

/** Begins the message of a job that no computation failed: it is handed out again and not counted as a failure. */
export const notCounted = 'not computed: ';

export const heartbeatMs = 5000;
export const machineGoneMs = 15_000;

export const otherRelease = (machine: string, server: string): string =>
  `This machine has release ${machine}, the server ${server}; both must have the same. Update the older one and join again.`;
