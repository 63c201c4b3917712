import type { Project, ProjectRole } from '@/api/projects.ts';
import type { SignOff } from '@/api/sign-offs.ts';
import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound, Refusal } from '../../refusal.ts';
import { signOffById } from '../../repositories/sign-offs.ts';
import { projectToRead } from '../rights.ts';

const mayDecide: Record<ProjectRole, boolean> = { owner: true, engineer: false, reviewer: true, viewer: false };

/** A sign-off of a project that the caller belongs to. */
export async function signOffToRead(context: Context, id: string): Promise<{ signOff: SignOff; project: Project }> {
  const signOff = isId(id) ? await signOffById(context.db, id, context.caller.id) : undefined;
  if (!signOff) throw notFound('sign-off');
  return { signOff, project: await projectToRead(context, signOff.projectId, 'sign-off') };
}

/** A sign-off that the caller may decide on: not one's own. */
export async function signOffToDecide(context: Context, id: string): Promise<SignOff> {
  const { signOff, project } = await signOffToRead(context, id);
  if (!mayDecide[project.role]) {
    throw new Refusal('forbidden', `A ${project.role} may not decide on a sign-off; a reviewer or owner may.`);
  }
  if (signOff.isOwn) throw new Refusal('forbidden', 'Whoever asked for a sign-off does not decide on it.');
  return signOff;
}
