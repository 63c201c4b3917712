import { endpoints } from '@/api/endpoints.ts';
import { unreadSchema } from '@/api/notices.ts';
import { addressOf, call } from '@/client/api.ts';
import { listen } from '@/client/live-events.ts';

/** Somebody on this page has marked notices as read. */
export const UNREAD_CHANGE = 'unreadchange';

const pollMs = 30_000;
/** The page's own work comes first. */
const listenAfterMs = 2_000;

/** Keeps the header's count of unread notices: by the server's word, and by asking while that does not come. */
export function keepUnreadCount(link: HTMLElement): void {
  const show = (unread: number) => {
    const badge = link.querySelector<HTMLElement>('[data-unread]');
    const spoken = link.querySelector<HTMLElement>('[data-unread-spoken]');
    if (!badge || !spoken) return;
    badge.textContent = unread > 99 ? '99+' : String(unread);
    badge.hidden = unread === 0;
    spoken.textContent = unreadText(unread);
  };
  let live = false;
  const ask = async () => {
    if (live || document.hidden) return;
    const answer = await call(endpoints.listNotices, { query: { limit: 1 } }).catch(() => null);
    if (answer) show(answer.unread);
  };
  setInterval(ask, pollMs);
  document.addEventListener(UNREAD_CHANGE, (event) => show((event as CustomEvent<number>).detail));
  setTimeout(() => {
    listen({
      address: () => addressOf(endpoints.noticeEvents),
      event: 'unread',
      onEvent: (data) => show(unreadSchema.parse(data).unread),
      onLive: (now) => {
        live = now;
      },
    });
  }, listenAfterMs);
}

export const unreadText = (unread: number): string => (unread === 0 ? 'none unread' : `${unread} unread`);
