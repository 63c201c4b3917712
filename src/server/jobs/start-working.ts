import { workerThreads } from '../config.ts';
import type { Database } from '../db/database.ts';
import { ServerRuns } from './server-runs.ts';
import { createSimulationPool } from './simulation-pool.ts';

const started = new WeakMap<Database, ServerRuns>();

/** Starts working off the server's runs; called once the database is ready. */
export async function startWorking(db: Database): Promise<void> {
  if (!started.has(db)) started.set(db, new ServerRuns(db, createSimulationPool(workerThreads())));
}
