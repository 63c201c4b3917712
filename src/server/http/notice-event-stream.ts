import { identify } from '../auth/identity.ts';
import type { Context } from '../context.ts';
import { noticeEvents } from '../events/notice-events.ts';
import { notFound } from '../refusal.ts';
import { unreadCount } from '../repositories/notices.ts';
import { eventStream, eventText } from './event-stream.ts';

/** How many of the caller's notices are unread: at once, and whenever it changes. */
export function noticeEventStream({ db, caller }: Context, request: Request): ReadableStream<Uint8Array> {
  let told: number | undefined;
  const tell = async () => {
    // The session may have ended and the token been revoked since.
    if (!(await identify(db, request))) throw notFound('session');
    const unread = await unreadCount(db, caller.id);
    if (unread === told) return null;
    told = unread;
    return eventText('unread', { unread });
  };
  const watch = (changed: () => void) => noticeEvents.watch(caller.id, changed);
  return eventStream({ watch, tell, settleMs: 100 }, request.signal);
}
