import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { commentSignOff } from '@/server/use-cases/sign-offs/comment-sign-off.ts';

export const POST = handle(endpoints.commentSignOff, async (call) => ({
  comment: await commentSignOff(call, call.params.id, call.body),
}));

export const ALL = methodNotAllowed('POST');
