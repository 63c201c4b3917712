import type { Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { runById } from '../../repositories/runs.ts';
import { projectToRead, projectToWrite } from '../rights.ts';

/** A run of a project that the caller belongs to. */
export async function runToRead(context: Context, runId: string): Promise<Run> {
  const run = isId(runId) ? await runById(context.db, runId) : undefined;
  if (!run) throw notFound('run');
  await projectToRead(context, run.projectId, 'run');
  return run;
}

/** A run that the caller may change. */
export async function runToWrite(context: Context, runId: string): Promise<Run> {
  const run = await runToRead(context, runId);
  await projectToWrite(context, run.projectId, 'run');
  return run;
}
