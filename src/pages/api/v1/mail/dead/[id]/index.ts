import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { discardDeadLetter } from '@/server/use-cases/notices/dead-letters.ts';

export const DELETE = handle(endpoints.discardDeadLetter, async (call) => {
  await discardDeadLetter(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('DELETE');
