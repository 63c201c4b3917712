import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getRelease } from '@/server/use-cases/releases/get-release.ts';

export const GET = handle(endpoints.getRelease, (call) => getRelease(call, call.params.id));

export const ALL = methodNotAllowed('GET');
