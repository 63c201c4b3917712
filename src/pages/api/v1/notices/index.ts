import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { listNotices } from '@/server/use-cases/notices/list-notices.ts';

export const GET = handle(endpoints.listNotices, (call) => listNotices(call, call.query));

export const ALL = methodNotAllowed('GET');
