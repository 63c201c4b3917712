import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { waitForEnd } from '@/server/use-cases/runs/wait-for-end.ts';

export const GET = handle(endpoints.runEnd, (call) =>
  waitForEnd(call, call.params.id, call.query.seconds, call.request.signal),
);

export const ALL = methodNotAllowed('GET');
