import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { projectToRead } from '@/server/use-cases/rights.ts';

export const GET = handle(endpoints.getProject, async (call) => ({
  project: await projectToRead(call, call.params.id),
}));

export const ALL = methodNotAllowed('GET');
