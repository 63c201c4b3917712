import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { markRead } from '@/server/use-cases/notices/mark-read.ts';

export const PATCH = handle(endpoints.patchNotice, (call) => markRead(call, call.params.id, call.body.read));

export const ALL = methodNotAllowed('PATCH');
