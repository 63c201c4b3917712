import type { Database } from '../../db/database.ts';
import { authorIdOf } from '../../repositories/runs.ts';

/** In whose name the server and the fleet store a run's shards. */
export async function authorOfRun(db: Database, runId: string): Promise<string> {
  const id = await authorIdOf(db, runId);
  if (id === undefined) throw new Error(`The run ${runId} is gone.`);
  return id;
}
