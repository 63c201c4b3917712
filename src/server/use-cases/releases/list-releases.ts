import type { Release } from '@/api/releases.ts';
import type { Context } from '../../context.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { releasesOf } from '../../repositories/releases.ts';
import { projectToRead } from '../rights.ts';

export async function listReleases(
  context: Context,
  projectId: string,
  query: { after?: string; limit?: number },
): Promise<{ releases: Release[]; next?: string }> {
  await projectToRead(context, projectId);
  const request = pageRequest(query);
  const { items, next } = pageOf(await releasesOf(context.db, projectId, request), request);
  return { releases: items, ...(next && { next }) };
}
