import { endpoints } from '@/api/endpoints.ts';
import { fileStorage } from '@/server/files/open-storage.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { rangedResponse } from '@/server/http/ranged-response.ts';
import { getReleaseFile } from '@/server/use-cases/releases/get-release.ts';

export const GET = handle(endpoints.getReleaseFile, async (call) => {
  const file = await getReleaseFile(call, await fileStorage(), call.params.id, call.params.name);
  return rangedResponse(call.request, { ...file, fileName: file.name });
});

export const HEAD = GET;

export const ALL = methodNotAllowed('GET');
