import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getJob } from '@/server/use-cases/jobs/get-job.ts';

export const GET = handle(endpoints.getJob, async (call) => ({ job: await getJob(call, call.params.id) }));

export const ALL = methodNotAllowed('GET');
