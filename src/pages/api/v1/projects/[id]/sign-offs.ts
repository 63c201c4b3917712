import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { filesPool } from '@/server/jobs/files-pool.ts';
import { askSignOff } from '@/server/use-cases/sign-offs/ask-sign-off.ts';
import { listSignOffs } from '@/server/use-cases/sign-offs/list-sign-offs.ts';

export const GET = handle(endpoints.listSignOffs, (call) => listSignOffs(call, call.params.id, call.query));

export const POST = handle(endpoints.askSignOff, async (call) => ({
  signOff: await askSignOff(call, filesPool(), call.params.id, call.body),
}));

export const ALL = methodNotAllowed('GET', 'POST');
