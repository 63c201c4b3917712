import type { AstroGlobal } from 'astro';
import type { Project } from '@/api/projects.ts';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { projectToRead } from '../use-cases/rights.ts';
import { requireUser } from './require-user.ts';

/** For pages of a project: the project with the reader's role in it, or the answer to give instead (redirection to the
 *  sign-in page, or the not-found page).
 *
 *      const project = await loadProject(Astro, Astro.params.id);
 *      if (project instanceof Response) return project;
 */
export async function loadProject(astro: AstroGlobal, id: string | undefined): Promise<Project | Response> {
  const user = requireUser(astro);
  if (user instanceof Response) return user;
  try {
    return await projectToRead({ db: database(), caller: user }, id ?? '');
  } catch (error) {
    // An empty 404 makes Astro render src/pages/404.astro.
    if (error instanceof Refusal) return new Response(null, { status: 404 });
    throw error;
  }
}
