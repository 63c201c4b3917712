import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { retryDeadLetter } from '@/server/use-cases/notices/dead-letters.ts';

export const POST = handle(endpoints.retryDeadLetter, async (call) => {
  await retryDeadLetter(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('POST');
