import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { type BuildPool, buildPool } from '../../jobs/build-pool.ts';
import { countAttempt, endJob, openJobs } from '../../repositories/jobs.ts';
import { buildRequestOf } from '../codes/stored-base.ts';
import { finishBuildJob } from './finish-build-job.ts';

const attemptsAllowed = 2;

/** Takes up the jobs that a restart interrupted, once; one interrupted again is given up, since it may be what brings
 *  the server down. Builds go on in the background. */
export async function redoInterruptedJobs(db: Database, pool: BuildPool = buildPool()): Promise<void> {
  for (const job of await openJobs(db)) {
    if (job.attempts >= attemptsAllowed) {
      const message = 'The server was restarted twice while this was being built. Nothing was kept; start it again.';
      await endJob(db, job.id, { error: { code: 'interrupted', message } }, nowText());
      continue;
    }
    await countAttempt(db, job.id);
    const building = buildRequestOf(db, job.projectId, job.request).then((request) => pool.build(request));
    void finishBuildJob(db, job, building);
  }
}
