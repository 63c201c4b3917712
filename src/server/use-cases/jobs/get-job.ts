import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { type Job, jobById, type StoredJob } from '../../repositories/jobs.ts';
import { projectToRead } from '../rights.ts';

export const shownJob = ({ id, kind, state, codeId, error }: StoredJob): Job => ({ id, kind, state, codeId, error });

export async function getJob(context: Context, jobId: string): Promise<Job> {
  const job = isId(jobId) ? await jobById(context.db, jobId) : undefined;
  if (!job) throw notFound('job');
  await projectToRead(context, job.projectId, 'job');
  return shownJob(job);
}
