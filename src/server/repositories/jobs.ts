import type { z } from 'zod';
import type { jobSchema, NewCode } from '@/api/codes.ts';
import type { Database } from '../db/database.ts';
import type { Row } from './row.ts';

export type Job = z.infer<typeof jobSchema>;
export type JobError = NonNullable<Job['error']>;
export interface StoredJob extends Job {
  projectId: string;
  request: NewCode;
  attempts: number;
  createdBy: string;
}

export async function insertJob(
  db: Database,
  job: { id: string; projectId: string; request: NewCode; createdBy: string; createdAt: string },
): Promise<void> {
  await db('jobs').insert({
    id: job.id,
    kind: 'build-code',
    state: 'working',
    project_id: job.projectId,
    request: JSON.stringify(job.request),
    attempts: 1,
    created_by: job.createdBy,
    created_at: job.createdAt,
  });
}

export async function jobById(db: Database, id: string): Promise<StoredJob | undefined> {
  const row = await db('jobs').where({ id }).first();
  return row && toJob(row);
}

/** Jobs that a restart of the server left unfinished. */
export async function openJobs(db: Database): Promise<StoredJob[]> {
  return (await db('jobs').whereIn('state', ['waiting', 'working']).orderBy('id')).map(toJob);
}

export async function countAttempt(db: Database, id: string): Promise<void> {
  await db('jobs').where({ id }).increment('attempts', 1);
}

/** Ends a job: done with a code, or failed with an error. */
export async function endJob(
  db: Database,
  id: string,
  end: { codeId: string } | { error: JobError },
  at: string,
): Promise<void> {
  const outcome =
    'codeId' in end ? { state: 'done', code_id: end.codeId } : { state: 'failed', error: JSON.stringify(end.error) };
  await db('jobs')
    .where({ id })
    .update({ ...outcome, ended_at: at });
}

function toJob(row: Row): StoredJob {
  return {
    id: row.id!,
    kind: row.kind!,
    state: row.state!,
    codeId: row.code_id!,
    error: row.error ? JSON.parse(row.error) : null,
    projectId: row.project_id!,
    request: JSON.parse(row.request!),
    attempts: row.attempts!,
    createdBy: row.created_by!,
  };
}
