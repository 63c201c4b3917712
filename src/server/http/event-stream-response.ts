/** Server-sent events; `no-transform` keeps compression from holding them back. */
export const eventStreamResponse = (body: ReadableStream<Uint8Array>): Response =>
  new Response(body, {
    headers: {
      'Content-Type': 'text/event-stream',
      'Cache-Control': 'no-cache, no-transform',
      'X-Accel-Buffering': 'no',
    },
  });
