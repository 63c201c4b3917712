import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { chooseNotices, noticeChoices } from '@/server/use-cases/notices/notice-choices.ts';

export const GET = handle(endpoints.getNoticeChoices, (call) => noticeChoices(call));

export const PUT = handle(endpoints.putNoticeChoices, (call) => chooseNotices(call, call.body));

export const ALL = methodNotAllowed('GET', 'PUT');
