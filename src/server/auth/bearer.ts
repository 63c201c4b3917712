import { nowText } from '../context.ts';
import type { Database } from '../db/database.ts';
import { Refusal } from '../refusal.ts';
import { noteTokenUse, tokenByDigest } from '../repositories/api-tokens.ts';
import type { Identity } from './identity.ts';
import { digestOfToken } from './token-secret.ts';

/** The last use is kept to the minute, so that a busy script does not cost a commit a request. */
const useNotedEveryMs = 60_000;

/** The token of an `Authorization: Bearer` header; undefined for other schemes, which a proxy in front may use. */
export function bearerOf(request: Request): string | undefined {
  return /^bearer +(\S+) *$/i.exec(request.headers.get('authorization') ?? '')?.[1];
}

/** Who presents a token, and what it may be used for.
 *  @throws Refusal `unauthenticated` when it is unknown, revoked or expired. */
export async function identityOfToken(db: Database, secret: string): Promise<Identity> {
  const token = await tokenByDigest(db, digestOfToken(secret));
  if (!token) throw refused('is not known');
  if (token.revokedAt) throw refused(`was revoked at ${token.revokedAt}`);
  const now = nowText();
  if (token.expiresAt <= now) throw refused(`expired at ${token.expiresAt}`);
  if (!token.lastUsedAt || Date.parse(now) - Date.parse(token.lastUsedAt) >= useNotedEveryMs) {
    await noteTokenUse(db, token.id, now);
  }
  return { user: token.owner, by: { kind: 'token', tokenId: token.id, scopes: token.scopes } };
}

const refused = (why: string): Refusal =>
  new Refusal('unauthenticated', `Authorization: the token ${why}; accepted is a standing token of your account page.`);
