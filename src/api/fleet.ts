import { z } from 'zod';

export const machineSchema = z.object({
  name: z.string(),
  release: z.string(),
  threads: z.number(),
  since: z.string(),
  shards: z.number(),
  /** Why it does not take part, if so. */
  refused: z.string().optional(),
});
export type FleetMachine = z.infer<typeof machineSchema>;

export const fleetSchema = z.object({
  /** `off` without REDIS_URL; `down` while Redis does not answer. */
  redis: z.enum(['off', 'up', 'down']),
  /** What a machine must have to join. */
  release: z.string(),
  /** Threads of this server. */
  serverThreads: z.number(),
  machines: z.array(machineSchema),
});
export type Fleet = z.infer<typeof fleetSchema>;
