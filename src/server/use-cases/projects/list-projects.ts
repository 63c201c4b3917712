import type { Project } from '@/api/projects.ts';
import type { Context } from '../../context.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { projectsOf } from '../../repositories/projects.ts';

export async function listProjects(
  { db, caller }: Context,
  query: { after?: string; limit?: number },
): Promise<{ projects: Project[]; next?: string }> {
  const request = pageRequest(query);
  const { items, next } = pageOf(await projectsOf(db, caller.id, request), request);
  return { projects: items, ...(next && { next }) };
}
