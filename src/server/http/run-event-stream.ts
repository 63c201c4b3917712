import { z } from 'zod';
import { pointSchema, runSchema } from '@/api/runs.ts';
import { identify } from '../auth/identity.ts';
import type { Context } from '../context.ts';
import { runEvents } from '../events/run-events.ts';
import { getRun } from '../use-cases/runs/get-run.ts';

/** Data of a `run` event: the run, and those of its points that have changed since the stream's last event. */
export const runEventSchema = z.object({ run: runSchema, points: z.array(pointSchema) });

const settleMs = 250;
const heartbeatMs = 15_000;

/** Server-sent events of one run: its state at once, then after each commit that changes it, at most four a second.
 *  An event is the state, not a step, so `Last-Event-ID` needs no replay: whoever reconnects gets the present state.
 *  Rights are checked afresh for every event. */
export function runEventStream(context: Context, runId: string, request: Request): ReadableStream<Uint8Array> {
  const { signal } = request;
  const encoder = new TextEncoder();
  const told = new Map<string, string>();
  let end = () => {};
  return new ReadableStream<Uint8Array>({
    start(controller) {
      let settling: NodeJS.Timeout | undefined;
      const send = (text: string) => controller.enqueue(encoder.encode(text));
      const tell = async () => {
        settling = undefined;
        try {
          // The session may have ended and the token been revoked since.
          if (!(await identify(context.db, request))) return end();
          const { run, points } = await getRun(context, runId);
          const changed = points.filter((point) => told.get(point.id) !== progressOf(point));
          for (const point of changed) told.set(point.id, progressOf(point));
          const data = JSON.stringify(runEventSchema.parse({ run, points: changed }));
          if (!ended) send(`id: ${run.frames}\nevent: run\ndata: ${data}\n\n`);
        } catch {
          // No longer shared with the caller, or the database is away: the browser reconnects and is told why.
          end();
        }
      };
      let ended = false;
      const unwatch = runEvents.watch(runId, () => {
        settling ??= setTimeout(tell, settleMs);
      });
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
      send('retry: 2000\n\n');
      void tell();
    },
    cancel: () => end(),
  });
}

const progressOf = ({ tally, done }: z.infer<typeof pointSchema>): string =>
  `${tally.frames} ${tally.frameErrors} ${done}`;
