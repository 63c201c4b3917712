import { endpoints } from '@/api/endpoints.ts';
import { streamResponse } from '@/server/http/file-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { filesPool } from '@/server/jobs/files-pool.ts';
import { exportWords } from '@/server/use-cases/codes/export-code.ts';

export const GET = handle(endpoints.getWords, async (call) => {
  const asked = { context: call, pool: filesPool(), codeId: call.params.id, signal: call.request.signal };
  return streamResponse(await exportWords(asked, call.query.form));
});

export const ALL = methodNotAllowed('GET');
