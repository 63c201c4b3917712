import { setTimeout as delay } from 'node:timers/promises';
import type { Code, NewCode } from '@/api/codes.ts';
import { type Context, nowText } from '../../context.ts';
import { newId } from '../../ids.ts';
import type { BuildPool } from '../../jobs/build-pool.ts';
import { codeById } from '../../repositories/codes.ts';
import { insertJob, type Job, jobById } from '../../repositories/jobs.ts';
import { finishBuildJob } from '../jobs/finish-build-job.ts';
import { shownJob } from '../jobs/get-job.ts';
import { projectToWrite } from '../rights.ts';
import { refusalOfBuild } from './build-refusal.ts';
import { keepCode, refuseDuplicate } from './keep-code.ts';
import { buildRequestOf } from './stored-base.ts';

// The interface promises 202 for what takes over a second; some of it is spent on the way.
const patienceMs = 900;

/** Builds a code in a worker and keeps it. What takes longer than the patience goes on as a job. */
export async function createCode(
  context: Context,
  pool: BuildPool,
  projectId: string,
  request: NewCode,
): Promise<{ code: Code } | { job: Job }> {
  await projectToWrite(context, projectId);
  const { db, caller } = context;
  if (request.fingerprint) await refuseDuplicate(db, projectId, request.fingerprint);
  const building = pool.build(await buildRequestOf(db, projectId, request));
  const answer = await Promise.race([building, delay(patienceMs, 'late' as const)]);
  if (answer !== 'late') {
    if (!answer.ok) throw refusalOfBuild(answer.failure);
    const id = await keepCode(db, answer.built, { projectId, userId: caller.id, request });
    return { code: (await codeById(db, id))! };
  }
  const job = { id: newId(), projectId, request, createdBy: caller.id, createdAt: nowText() };
  await insertJob(db, job);
  void finishBuildJob(db, job, building);
  return { job: shownJob((await jobById(db, job.id))!) };
}
