import { endpoints } from '@/api/endpoints.ts';
import { eventStreamResponse } from '@/server/http/event-stream-response.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { runEventStream } from '@/server/http/run-event-stream.ts';
import { runToRead } from '@/server/use-cases/runs/run-access.ts';

export const GET = handle(endpoints.runEvents, async (call) => {
  await runToRead(call, call.params.id);
  return eventStreamResponse(runEventStream(call, call.params.id, call.query.since, call.request));
});

export const ALL = methodNotAllowed('GET');
