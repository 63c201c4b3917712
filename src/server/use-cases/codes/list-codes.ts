import type { Code } from '@/api/codes.ts';
import type { Context } from '../../context.ts';
import { codesOf } from '../../repositories/codes.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { projectToRead } from '../rights.ts';

export async function listCodes(
  context: Context,
  projectId: string,
  query: { after?: string; limit?: number },
): Promise<{ codes: Code[]; next?: string }> {
  await projectToRead(context, projectId);
  const request = pageRequest(query);
  const { items, next } = pageOf(await codesOf(context.db, projectId, request), request);
  return { codes: items, ...(next && { next }) };
}
