import type { Fleet } from '@/api/fleet.ts';
import { workerThreads } from '../../config.ts';
import { usualThreads } from '../../jobs/simulation-pool.ts';
import { fleetRuns } from '../../jobs/start-working.ts';
import { programVersion } from '../../version.ts';

/** Where shards can be computed besides browsers. */
export async function fleetState(): Promise<Fleet> {
  const fleet = fleetRuns();
  const { redis, machines } = fleet ? await fleet.state() : { redis: 'off' as const, machines: [] };
  return { redis, machines, release: programVersion, serverThreads: workerThreads() ?? usualThreads() };
}
