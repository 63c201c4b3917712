import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { createRun } from '@/server/use-cases/runs/create-run.ts';
import { listRuns } from '@/server/use-cases/runs/list-runs.ts';

export const GET = handle(endpoints.listRuns, (call) => listRuns(call, call.params.id, call.query));

// Room for the 100 000 points that a run may have.
const bodyLimitBytes = 32 * 1024 * 1024;

export const POST = handle(
  endpoints.createRun,
  async (call) => ({ run: await createRun(call, call.params.id, call.body) }),
  { bodyLimitBytes },
);

export const ALL = methodNotAllowed('GET', 'POST');
