import { getToken } from '@auth/core/jwt';
import { authSecret, isProduction } from '../config.ts';
import { type Caller, nowText } from '../context.ts';
import type { Database } from '../db/database.ts';
import { userOfSession } from '../repositories/users.ts';

/** Who sends a request: its cookie's token names a session, and the database says whether it stands and who its user
 *  is now. Nothing but the session's id is taken from the token. */
export async function currentUser(db: Database, request: Request): Promise<Caller | null> {
  if (!request.headers.has('cookie')) return null;
  const secureCookie = isProduction();
  const cookieName = `${secureCookie ? '__Secure-' : ''}authjs.session-token`;
  const token = await getToken({ req: request, secret: authSecret(), secureCookie, cookieName, salt: cookieName });
  if (typeof token?.sessionId !== 'string') return null;
  return (await userOfSession(db, token.sessionId, nowText())) ?? null;
}
