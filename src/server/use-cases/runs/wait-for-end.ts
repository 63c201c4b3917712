import type { Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { runEvents } from '../../events/run-events.ts';
import { runToRead } from './run-access.ts';

const ended = (run: Run): boolean => run.state === 'finished' || run.state === 'stopped';

/** The run as soon as it has ended, or as it stands when the time is up, the server is told to end or the caller has
 *  gone. Rights are checked at each look. */
export async function waitForEnd(
  context: Context,
  runId: string,
  seconds: number,
  signal: AbortSignal,
): Promise<{ run: Run; ended: boolean }> {
  const until = Date.now() + seconds * 1000;
  for (;;) {
    // Watched before it is read, so that no commit falls between.
    const next = nextChange(runId, until - Date.now(), signal);
    const run = await runToRead(context, runId).catch((error) => {
      next.cancel();
      throw error;
    });
    if (ended(run) || Date.now() >= until || signal.aborted) {
      next.cancel();
      return { run, ended: ended(run) };
    }
    await next.promise;
  }
}

/** Resolves at the run's next change, but looks again only after a moment, since a busy run changes many times a
 *  second. */
const settleMs = 200;

function nextChange(runId: string, ms: number, signal: AbortSignal): { promise: Promise<void>; cancel(): void } {
  let cancel = () => {};
  const promise = new Promise<void>((resolve) => {
    const unwatch = runEvents.watch(runId, () => {
      clearTimeout(timer);
      timer = setTimeout(done, Math.max(0, Math.min(settleMs, ms)));
    });
    const done = () => {
      clearTimeout(timer);
      unwatch();
      signal.removeEventListener('abort', done);
      resolve();
    };
    let timer = setTimeout(done, Math.max(0, ms));
    signal.addEventListener('abort', done);
    cancel = done;
  });
  return { promise, cancel };
}
