/** One watcher's stream of server-sent events. */
export interface EventSource {
  /** Begins to watch; `changed` may be called as often as anything changes. @returns a function that ends the watch. */
  watch(changed: () => void): () => void;
  /** The next event as stream text, or null when there is nothing to tell; called at the start and after changes.
   *  Throws when the watcher may no longer see it. */
  tell(): Promise<string | null>;
  /** Least time between two events. */
  settleMs: number;
}

const heartbeatMs = 15_000;
const retryMs = 2_000;

/** An event's lines. @param id what the browser sends back as Last-Event-ID when it reconnects. */
export const eventText = (name: string, data: unknown, id?: string): string =>
  `${id === undefined ? '' : `id: ${id}\n`}event: ${name}\ndata: ${JSON.stringify(data)}\n\n`;

/** Server-sent events: the state at once, then after each change of it, with a sign of life in between. The stream
 *  ends with the request, or when `tell` throws; the browser then reconnects and is told why. */
export function eventStream(source: EventSource, signal: AbortSignal): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  let end = () => {};
  return new ReadableStream<Uint8Array>({
    start(controller) {
      let ended = false;
      let settling: NodeJS.Timeout | undefined;
      let telling = false;
      let changedMeanwhile = false;
      const send = (text: string) => {
        if (!ended) controller.enqueue(encoder.encode(text));
      };
      const tell = async () => {
        settling = undefined;
        telling = true;
        changedMeanwhile = false;
        try {
          const text = await source.tell();
          if (text !== null) send(text);
        } catch {
          end();
        }
        telling = false;
        if (changedMeanwhile) changed();
      };
      const changed = () => {
        if (ended) return;
        if (telling) changedMeanwhile = true;
        else settling ??= setTimeout(tell, source.settleMs);
      };
      const unwatch = source.watch(changed);
      const heart = setInterval(() => send(': still here\n\n'), heartbeatMs);
      end = () => {
        if (ended) return;
        ended = true;
        unwatch();
        clearInterval(heart);
        clearTimeout(settling);
        signal.removeEventListener('abort', end);
        // Cancelled streams are closed already.
        try {
          controller.close();
        } catch {}
      };
      signal.addEventListener('abort', end);
      send(`retry: ${retryMs}\n\n`);
      void tell();
    },
    cancel: () => end(),
  });
}
