import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { endRelease } from '@/server/use-cases/releases/end-release.ts';

export const POST = handle(endpoints.endRelease, async (call) => ({
  release: await endRelease(call, call.params.id, call.body),
}));

export const ALL = methodNotAllowed('POST');
