import type { SignOff } from '@/api/sign-offs.ts';
import type { Context } from '../../context.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { signOffsOf } from '../../repositories/sign-offs.ts';
import { projectToRead } from '../rights.ts';

export async function listSignOffs(
  context: Context,
  projectId: string,
  query: { after?: string; limit?: number },
): Promise<{ signOffs: SignOff[]; next?: string }> {
  await projectToRead(context, projectId);
  const request = pageRequest(query);
  const { items, next } = pageOf(await signOffsOf(context.db, projectId, context.caller.id, request), request);
  return { signOffs: items, ...(next && { next }) };
}
