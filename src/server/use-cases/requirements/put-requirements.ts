import type { Requirements } from '@/api/projects.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { requirementsOf, type StoredRequirements, saveRequirements } from '../../repositories/requirements.ts';
import { projectToWrite } from '../rights.ts';

/** States the requirements; what they were before stays in the record of events. */
export async function putRequirements(
  context: Context,
  projectId: string,
  requirements: Requirements,
): Promise<StoredRequirements> {
  await projectToWrite(context, projectId);
  const { db, caller } = context;
  return inTransaction(db, async (trx) => {
    const before = await requirementsOf(trx, projectId);
    await saveRequirements(trx, projectId, requirements, { userId: caller.id, at: nowText() });
    const content = { before: before.requirements, after: requirements };
    await recordEvent(trx, caller, { projectId, kind: 'requirements.stated', subject: projectId, content });
    return requirementsOf(trx, projectId);
  });
}
