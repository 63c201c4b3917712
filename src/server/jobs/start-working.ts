import { redisUrl, workerThreads } from '../config.ts';
import type { Database } from '../db/database.ts';
import type { FleetRuns } from '../fleet/fleet-runs.ts';
import { programVersion } from '../version.ts';
import { ServerRuns } from './server-runs.ts';
import { createSimulationPool } from './simulation-pool.ts';

let working: { server: ServerRuns; fleet: FleetRuns | undefined } | undefined;

/** Starts working off the runs of the server, and with REDIS_URL those of the fleet; called once the database is
 *  ready. */
export async function startWorking(db: Database): Promise<void> {
  if (working) return;
  const url = redisUrl();
  const server = new ServerRuns(db, createSimulationPool(workerThreads()));
  working = { server, fleet: undefined };
  if (!url) return;
  const { FleetRuns } = await import('../fleet/fleet-runs.ts');
  working.fleet = new FleetRuns(db, url, programVersion);
}

export const fleetRuns = (): FleetRuns | undefined => working?.fleet;
