import type { AstroGlobal } from 'astro';
import type { Code } from '@/api/codes.ts';
import { database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { getCode } from '../use-cases/codes/get-code.ts';
import { requireUser } from './require-user.ts';

/** For pages of a code: the code if the reader may see it and it is of that project, or the not-found answer. */
export async function loadCode(
  astro: AstroGlobal,
  projectId: string,
  id: string | undefined,
): Promise<Code | Response> {
  const user = requireUser(astro);
  if (user instanceof Response) return user;
  try {
    const code = await getCode({ db: database(), caller: user }, id ?? '');
    return code.projectId === projectId ? code : new Response(null, { status: 404 });
  } catch (error) {
    if (error instanceof Refusal) return new Response(null, { status: 404 });
    throw error;
  }
}
