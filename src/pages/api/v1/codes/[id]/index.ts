import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { deleteCode } from '@/server/use-cases/codes/delete-code.ts';
import { getCode } from '@/server/use-cases/codes/get-code.ts';

export const GET = handle(endpoints.getCode, async (call) => ({ code: await getCode(call, call.params.id) }));

export const DELETE = handle(endpoints.deleteCode, async (call) => {
  await deleteCode(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('GET', 'DELETE');
