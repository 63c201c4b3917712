import type { AstroGlobal } from 'astro';
import type { Run } from '@/api/runs.ts';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { runToRead } from '../use-cases/runs/run-access.ts';
import { requireUser } from './require-user.ts';

/** For pages of a run: the run if the reader may see it and it is of that project, or the not-found answer. */
export async function loadRun(astro: AstroGlobal, projectId: string, id: string | undefined): Promise<Run | Response> {
  const user = requireUser(astro);
  if (user instanceof Response) return user;
  try {
    const run = await runToRead({ db: database(), caller: user }, id ?? '');
    return run.projectId === projectId ? run : new Response(null, { status: 404 });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: 404 });
    throw error;
  }
}
