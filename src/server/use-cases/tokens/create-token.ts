import type { NewToken, Token } from '@/api/tokens.ts';
import { digestOfToken, makeTokenSecret } from '../../auth/token-secret.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { Refusal } from '../../refusal.ts';
import { insertToken, tokensOf } from '../../repositories/api-tokens.ts';
import { recordEvent } from '../../repositories/audit-events.ts';

const dayMs = 24 * 3600_000;
const mostTokens = 50;

/** Makes a token. Its secret is in this answer and nowhere else afterwards. */
export async function createToken(
  { db, caller }: Context,
  { name, scopes, days }: NewToken,
): Promise<{ token: Token; secret: string }> {
  const secret = makeTokenSecret();
  const id = newId();
  const made = { id, name, scopes, ending: secret.slice(-4), createdAt: nowText(), expiresAt: nowText(days * dayMs) };
  await inTransaction(db, async (trx) => {
    if ((await tokensOf(trx, caller.id)).length >= mostTokens) {
      throw new Refusal('limit', `An account has at most ${mostTokens} tokens; revoke one that is no longer used.`);
    }
    await insertToken(trx, { ...made, userId: caller.id, digest: digestOfToken(secret) });
    const content = { name, scopes, expiresAt: made.expiresAt };
    await recordEvent(trx, caller, { projectId: null, kind: 'token.created', subject: id, content });
  });
  return { token: { ...made, lastUsedAt: null }, secret };
}
