import type { z } from 'zod';
import type { Account, accountPatchSchema } from '@/api/account.ts';
import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { renameUser } from '../../repositories/users.ts';
import { accountOf } from './account-of.ts';

export async function renameAccount(
  { db, caller }: Context,
  { name }: z.output<typeof accountPatchSchema>,
): Promise<Account> {
  await inTransaction(db, async (trx) => {
    await renameUser(trx, caller.id, name);
    const content = { before: caller.name, name };
    await recordEvent(trx, caller, { projectId: null, kind: 'account.renamed', subject: caller.id, content });
  });
  return accountOf({ ...caller, name });
}
