import { type Context, nowText } from '../../context.ts';
import { noticeEvents } from '../../events/notice-events.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { setAllRead, setNoticeRead, unreadCount } from '../../repositories/notices.ts';

/** Marks one of the caller's notices as read or unread. @returns how many are unread then. */
export async function markRead({ db, caller }: Context, id: string, read: boolean): Promise<{ unread: number }> {
  if (!isId(id) || !(await setNoticeRead(db, caller.id, id, read ? nowText() : null))) throw notFound('notice');
  noticeEvents.changed(caller.id);
  return { unread: await unreadCount(db, caller.id) };
}

export async function markAllRead({ db, caller }: Context): Promise<{ unread: number }> {
  await setAllRead(db, caller.id, nowText());
  noticeEvents.changed(caller.id);
  return { unread: await unreadCount(db, caller.id) };
}
