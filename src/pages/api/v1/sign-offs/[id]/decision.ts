import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { decideSignOff } from '@/server/use-cases/sign-offs/decide-sign-off.ts';

export const POST = handle(endpoints.decideSignOff, async (call) => ({
  signOff: await decideSignOff(call, call.params.id, call.body),
}));

export const ALL = methodNotAllowed('POST');
