import type { AstroGlobal } from 'astro';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { getSignOff } from '../use-cases/sign-offs/get-sign-off.ts';
import { requireUser } from './require-user.ts';

/** For the page of a sign-off: its sheet if the reader may see it and it is of that project, or the not-found answer. */
export async function loadSignOff(astro: AstroGlobal, projectId: string, id: string | undefined) {
  const user = requireUser(astro);
  if (user instanceof Response) return user;
  try {
    const sheet = await getSignOff({ db: database(), caller: user }, id ?? '');
    return sheet.signOff.projectId === projectId ? sheet : new Response(null, { status: 404 });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: 404 });
    throw error;
  }
}
