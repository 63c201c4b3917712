import type { Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { runsOf } from '../../repositories/runs.ts';
import { projectToRead } from '../rights.ts';

export async function listRuns(
  context: Context,
  projectId: string,
  query: { after?: string; limit?: number },
): Promise<{ runs: Run[]; next?: string }> {
  await projectToRead(context, projectId);
  const request = pageRequest(query);
  const { items, next } = pageOf(await runsOf(context.db, projectId, request), request);
  return { runs: items, ...(next && { next }) };
}
