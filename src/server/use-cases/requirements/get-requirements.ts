import type { Context } from '../../context.ts';
import { requirementsOf, type StoredRequirements } from '../../repositories/requirements.ts';
import { projectToRead } from '../rights.ts';

export async function getRequirements(context: Context, projectId: string): Promise<StoredRequirements> {
  await projectToRead(context, projectId);
  return requirementsOf(context.db, projectId);
}
