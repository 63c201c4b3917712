import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { filesPool } from '@/server/jobs/files-pool.ts';
import { rebuildRelease } from '@/server/use-cases/releases/rebuild-release.ts';

export const POST = handle(endpoints.rebuildRelease, (call) =>
  rebuildRelease(call, filesPool(), call.params.id, call.request.signal),
);

export const ALL = methodNotAllowed('POST');
