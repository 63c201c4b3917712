import type { z } from 'zod';
import type { newProjectSchema, Project } from '@/api/projects.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { insertMembership } from '../../repositories/memberships.ts';
import { insertProject, projectOf } from '../../repositories/projects.ts';

/** Starts a project that the caller owns. Guests only see what is shared with them. */
export async function createProject(
  { db, caller }: Context,
  input: z.output<typeof newProjectSchema>,
): Promise<Project> {
  if (caller.role === 'guest') throw new Refusal('forbidden', 'A guest may not start projects; a member may.');
  const id = newId();
  const createdAt = nowText();
  await inTransaction(db, async (trx) => {
    const { name, description = '' } = input;
    await insertProject(trx, { id, name, description, isDemo: false, createdBy: caller.id, createdAt });
    await insertMembership(trx, { projectId: id, userId: caller.id, role: 'owner', createdAt });
    await recordEvent(trx, caller, { projectId: id, kind: 'project.created', subject: id, content: { name } });
  });
  return (await projectOf(db, id, caller.id))!;
}
