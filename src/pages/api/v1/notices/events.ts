import { endpoints } from '@/api/endpoints.ts';
import { eventStreamResponse } from '@/server/http/event-stream-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { noticeEventStream } from '@/server/http/notice-event-stream.ts';

export const GET = handle(endpoints.noticeEvents, async (call) =>
  eventStreamResponse(noticeEventStream(call, call.request)),
);

export const ALL = methodNotAllowed('GET');
