import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { markAllRead } from '@/server/use-cases/notices/mark-read.ts';

export const POST = handle(endpoints.readAllNotices, (call) => markAllRead(call));

export const ALL = methodNotAllowed('POST');
