import type { AstroGlobal } from 'astro';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { getRelease } from '../use-cases/releases/get-release.ts';
import { listReleases } from '../use-cases/releases/list-releases.ts';
import { requireUser } from './require-user.ts';

/** For the page of a release: its sheet, and the later releases that hold, if the reader may see it and it is of that
 *  project; else the not-found answer. */
export async function loadRelease(astro: AstroGlobal, projectId: string, id: string | undefined) {
  const user = requireUser(astro);
  if (user instanceof Response) return user;
  const context = { db: database(), caller: user };
  try {
    const sheet = await getRelease(context, id ?? '');
    if (sheet.release.projectId !== projectId) return new Response(null, { status: 404 });
    const { releases } = await listReleases(context, projectId, { limit: 500 });
    const successors = releases
      .filter(({ number, state }) => number > sheet.release.number && state !== 'withdrawn')
      .map((release) => ({ id: release.id, number: release.number }));
    return { ...sheet, successors };
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: 404 });
    throw error;
  }
}
