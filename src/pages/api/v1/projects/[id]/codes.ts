import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed, Reply } from '@/server/http/handle.ts';
import { buildPool } from '@/server/jobs/build-pool.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { listCodes } from '@/server/use-cases/codes/list-codes.ts';

export const GET = handle(endpoints.listCodes, (call) => listCodes(call, call.params.id, call.query));

export const POST = handle(endpoints.createCode, async (call) => {
  const made = await createCode(call, buildPool(), call.params.id, call.body);
  return 'job' in made ? new Reply(202, made) : made;
});

export const ALL = methodNotAllowed('GET', 'POST');
