import { endpoints } from '@/api/endpoints.ts';
import { fileResponse } from '@/server/http/file-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getMatrix } from '@/server/use-cases/codes/get-matrix.ts';

export const GET = handle(endpoints.getMatrix, async (call) =>
  fileResponse(await getMatrix(call, call.params.id, call.query.format)),
);

export const ALL = methodNotAllowed('GET');
