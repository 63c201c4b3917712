import type { AstroGlobal } from 'astro';
import { type NoticeKind, noticeKinds } from '@/api/notices.ts';
import { database } from '../db/database.ts';
import { readMailOffLink } from '../mail/mail-off-link.ts';
import { turnMail } from '../use-cases/notices/notice-choices.ts';

export type MailOff =
  | { state: 'unknown-link' }
  | { state: 'asked' | 'off' | 'on'; kind: NoticeKind; what: string; action: string };

/** What a letter's link to turn its kind off comes to. Following the link only shows the page, which sends the form by
 *  itself: programs that fetch every link of a letter to look it over must not turn anything off. A POST does it, from
 *  that page or from a mail program's own button (RFC 8058). */
export async function mailOff({ url, request }: AstroGlobal): Promise<MailOff> {
  const link = readMailOffLink(url.searchParams);
  if (!link) return { state: 'unknown-link' };
  const { userId, kind } = link;
  const shown = { kind, what: noticeKinds[kind], action: `${url.pathname}${url.search}` };
  if (request.method !== 'POST') return { state: 'asked', ...shown };
  const on = (await request.text()) === 'mail=on';
  if (!(await turnMail(database(), userId, kind, on))) return { state: 'unknown-link' };
  return { state: on ? 'on' : 'off', ...shown };
}
