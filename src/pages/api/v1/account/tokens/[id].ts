import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { revokeToken } from '@/server/use-cases/tokens/revoke-token.ts';

export const DELETE = handle(endpoints.revokeToken, async (call) => {
  await revokeToken(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('DELETE');
