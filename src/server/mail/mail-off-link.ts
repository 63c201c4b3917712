import { createHmac, timingSafeEqual } from 'node:crypto';
import { type NoticeKind, noticeKindSchema } from '@/api/notices.ts';
import { paths } from '@/paths.ts';
import { authSecret } from '../config.ts';

/** The address that turns one kind of notice off for one person's mail. It works signed out, because whoever holds the
 *  letter is its reader; the signature keeps others' choices out of reach. It does not expire: an old letter must
 *  still let go of its reader. */
export function mailOffPath(userId: string, kind: NoticeKind): string {
  return `${paths.mailOff}?${new URLSearchParams({ to: userId, kind, sign: signature(userId, kind) })}`;
}

/** Whose mail of which kind an address turns off; null when it was not made here. */
export function readMailOffLink(query: URLSearchParams): { userId: string; kind: NoticeKind } | null {
  const userId = query.get('to') ?? '';
  const kind = noticeKindSchema.safeParse(query.get('kind'));
  if (!kind.success) return null;
  const expected = Buffer.from(signature(userId, kind.data));
  const given = Buffer.from(query.get('sign') ?? '');
  const good = given.length === expected.length && timingSafeEqual(given, expected);
  return good ? { userId, kind: kind.data } : null;
}

const signature = (userId: string, kind: NoticeKind): string =>
  createHmac('sha256', authSecret()).update(`mail-off\n${userId}\n${kind}`).digest('base64url');
