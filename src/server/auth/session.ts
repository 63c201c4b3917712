import { getToken } from '@auth/core/jwt';
import { authSecret, isProduction } from '../config.ts';
import { nowText } from '../context.ts';
import type { Database } from '../db/database.ts';
import { userOfSession } from '../repositories/users.ts';
import type { Identity } from './identity.ts';

/** Whose session a request's cookie names: the database says whether it stands and who its user is now. Nothing but
 *  the session's id is taken from the cookie's token. */
export async function identityOfSession(db: Database, request: Request): Promise<Identity | null> {
  if (!request.headers.has('cookie')) return null;
  const secureCookie = isProduction();
  const cookieName = `${secureCookie ? '__Secure-' : ''}authjs.session-token`;
  const token = await getToken({ req: request, secret: authSecret(), secureCookie, cookieName, salt: cookieName });
  if (typeof token?.sessionId !== 'string') return null;
  const user = await userOfSession(db, token.sessionId, nowText());
  return user ? { user, by: { kind: 'session', sessionId: token.sessionId } } : null;
}
