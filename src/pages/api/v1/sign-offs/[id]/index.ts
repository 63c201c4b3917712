import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getSignOff } from '@/server/use-cases/sign-offs/get-sign-off.ts';

export const GET = handle(endpoints.getSignOff, (call) => getSignOff(call, call.params.id));

export const ALL = methodNotAllowed('GET');
