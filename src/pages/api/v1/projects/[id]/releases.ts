import { endpoints } from '@/api/endpoints.ts';
import { fileStorage } from '@/server/files/open-storage.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { filesPool } from '@/server/jobs/files-pool.ts';
import { createRelease } from '@/server/use-cases/releases/create-release.ts';
import { listReleases } from '@/server/use-cases/releases/list-releases.ts';

export const GET = handle(endpoints.listReleases, (call) => listReleases(call, call.params.id, call.query));

export const POST = handle(endpoints.createRelease, async (call) => {
  const making = { pool: filesPool(), storage: await fileStorage(), signal: call.request.signal };
  return { release: await createRelease(call, making, call.params.id, call.body) };
});

export const ALL = methodNotAllowed('GET', 'POST');
