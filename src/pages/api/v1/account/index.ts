import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { accountOf } from '@/server/use-cases/account/account-of.ts';
import { renameAccount } from '@/server/use-cases/account/rename-account.ts';

export const GET = handle(endpoints.getAccount, async ({ caller }) => ({ account: accountOf(caller) }));

export const PATCH = handle(endpoints.patchAccount, async (call) => ({
  account: await renameAccount(call, call.body),
}));

export const ALL = methodNotAllowed('GET', 'PATCH');
