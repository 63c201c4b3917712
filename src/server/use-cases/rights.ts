import type { Project, ProjectRole } from '@/api/projects.ts';
import type { Context } from '../context.ts';
import { isId } from '../ids.ts';
import { notFound, Refusal } from '../refusal.ts';
import { projectOf } from '../repositories/projects.ts';

/** What each role may do in a project. Reading is every member's. */
const mayWrite: Record<ProjectRole, boolean> = { owner: true, engineer: true, reviewer: false, viewer: false };

/** The project, when the caller belongs to it; to everybody else it does not exist. */
export async function projectToRead(context: Context, projectId: string, what = 'project'): Promise<Project> {
  const project = isId(projectId) ? await projectOf(context.db, projectId, context.caller.id) : undefined;
  if (!project) throw notFound(what);
  return project;
}

/** The project, when the caller may change what is in it. */
export async function projectToWrite(context: Context, projectId: string, what = 'project'): Promise<Project> {
  const project = await projectToRead(context, projectId, what);
  if (!mayWrite[project.role]) {
    throw new Refusal('forbidden', `A ${project.role} may not change this; an engineer or owner of the project may.`);
  }
  return project;
}
