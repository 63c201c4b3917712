import type { BuildAnswer } from '@workers/build/api.ts';
import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { isStorageError } from '../../db/storage-error.ts';
import { Refusal } from '../../refusal.ts';
import { endJob, type JobError, type StoredJob } from '../../repositories/jobs.ts';
import { refusalOfBuild } from '../codes/build-refusal.ts';
import { keepCode } from '../codes/keep-code.ts';

type BuildJob = Pick<StoredJob, 'id' | 'projectId' | 'request' | 'createdBy'>;

/** Waits for a build that outlived its request and records its end. Never throws: a job that cannot be recorded now
 *  (storage failing) stays open and is taken up at the next start. */
export async function finishBuildJob(db: Database, job: BuildJob, building: Promise<BuildAnswer>): Promise<void> {
  const { id, projectId, request, createdBy: userId } = job;
  try {
    const error = await outcome(db, building, { projectId, userId, request, jobId: id });
    if (error) await endJob(db, id, { error }, nowText());
  } catch (error) {
    console.error(`Job ${id} could not be recorded and will be taken up at the next start:`, error);
  }
}

async function outcome(
  db: Database,
  building: Promise<BuildAnswer>,
  keeping: Parameters<typeof keepCode>[2],
): Promise<JobError | undefined> {
  try {
    const answer = await building;
    if (!answer.ok) throw refusalOfBuild(answer.failure);
    await keepCode(db, answer.built, keeping);
    return undefined;
  } catch (error) {
    if (error instanceof Refusal) return { code: error.code, message: error.message };
    if (isStorageError(error)) throw error;
    console.error(`Job ${keeping.jobId}:`, error);
    return { code: 'internal', message: 'The build failed by a fault of the program; it has been logged.' };
  }
}
