import { endpoints } from '@/api/endpoints.ts';
import { streamResponse } from '@/server/http/file-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { listRunPoints } from '@/server/use-cases/runs/list-run-points.ts';
import { pointsCsv } from '@/server/use-cases/runs/points-csv.ts';

export const GET = handle(endpoints.runPoints, async (call) => {
  const { id } = call.params;
  if ((call.query.format ?? wantedBy(call.request)) === 'json') return listRunPoints(call, id, call.query);
  const stream = await pointsCsv(call, id);
  return streamResponse({ stream, fileName: `points-${id}.csv`, mediaType: 'text/csv; charset=utf-8' });
});

const wantedBy = (request: Request): 'json' | 'csv' =>
  /^text\/csv\b/i.test(request.headers.get('accept')?.trim() ?? '') ? 'csv' : 'json';

export const ALL = methodNotAllowed('GET');
