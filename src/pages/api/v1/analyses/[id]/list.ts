import { endpoints } from '@/api/endpoints.ts';
import { fileResponse } from '@/server/http/file-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getAnalysisList } from '@/server/use-cases/analyses/get-analysis.ts';

export const GET = handle(endpoints.getAnalysisList, async (call) =>
  fileResponse(await getAnalysisList(call, call.params.id)),
);

export const ALL = methodNotAllowed('GET');
