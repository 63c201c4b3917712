import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getRun } from '@/server/use-cases/runs/get-run.ts';
import { patchRun } from '@/server/use-cases/runs/patch-run.ts';

export const GET = handle(endpoints.getRun, (call) => getRun(call, call.params.id));

export const PATCH = handle(endpoints.patchRun, async (call) => ({
  run: await patchRun(call, call.params.id, call.body),
}));

export const ALL = methodNotAllowed('GET', 'PATCH');
