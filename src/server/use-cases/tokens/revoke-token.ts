import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { revokeTokenRow, tokenOf } from '../../repositories/api-tokens.ts';
import { recordEvent } from '../../repositories/audit-events.ts';

/** Ends one of the caller's tokens: the next request with it is refused. */
export async function revokeToken({ db, caller }: Context, id: string): Promise<void> {
  await inTransaction(db, async (trx) => {
    const token = isId(id) ? await tokenOf(trx, caller.id, id) : undefined;
    if (!token) throw notFound('token');
    await revokeTokenRow(trx, id, nowText());
    const content = { name: token.name };
    await recordEvent(trx, caller, { projectId: null, kind: 'token.revoked', subject: id, content });
  });
}
