import type { Notice } from '@/api/notices.ts';
import type { Context } from '../../context.ts';
import { noticesOf, unreadCount } from '../../repositories/notices.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';

/** The caller's own notices, newest first, and how many of them all are unread. */
export async function listNotices(
  { db, caller }: Context,
  query: { after?: string; limit?: number },
): Promise<{ notices: Notice[]; unread: number; next?: string }> {
  const request = pageRequest(query);
  const { items, next } = pageOf(await noticesOf(db, caller.id, request), request);
  return { notices: items, unread: await unreadCount(db, caller.id), ...(next && { next }) };
}
