import type { Endpoint } from '@/api/endpoint.ts';
import type { Scope } from '@/api/tokens.ts';
import type { Caller } from '../context.ts';
import type { Database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { bearerOf, identityOfToken } from './bearer.ts';
import { identityOfSession } from './session.ts';

/** By what somebody came in. A token may do no more than its scopes; a session all that its user may. */
export type Admission =
  | { kind: 'session'; sessionId: string }
  | { kind: 'token'; tokenId: string; scopes: readonly Scope[] };

export interface Identity {
  user: Caller;
  by: Admission;
}

/** Who sends a request, or null. A token counts under /api/v1 only, and there it alone: its request's cookie is not
 *  looked at, so a page of another site gains nothing by making a browser send one.
 *  @throws Refusal when a token is presented that does not stand. */
export async function identify(db: Database, request: Request): Promise<Identity | null> {
  const secret = new URL(request.url).pathname.startsWith('/api/v1/') ? bearerOf(request) : undefined;
  return secret === undefined ? identityOfSession(db, request) : identityOfToken(db, secret);
}

/** Holds an endpoint shut to tokens without one of its scopes.
 *  @throws Refusal `forbidden`. */
export function demandScope(endpoint: Pick<Endpoint, 'method' | 'path' | 'scopes'>, by: Admission): void {
  if (by.kind === 'session' || endpoint.scopes.some((scope) => by.scopes.includes(scope))) return;
  const { method, path, scopes } = endpoint;
  const accepted = scopes.length > 0 ? `a token with the scope ${scopes.join(' or ')}` : 'a signed-in person, no token';
  const message = `scope: this token has ${by.scopes.join(', ')}; ${method} ${path} accepts ${accepted}.`;
  throw new Refusal('forbidden', message, { fields: { scope: accepted } });
}

/** The session of a request that came in by one.
 *  @throws Refusal `forbidden` for a token. */
export function sessionIdOf(by: Admission): string {
  if (by.kind === 'session') return by.sessionId;
  throw new Refusal('forbidden', 'This is for a signed-in person; no token may do it.');
}
