import type { NoticeKind } from '@/api/notices.ts';
import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { noticeEvents } from '../../events/notice-events.ts';
import { newId } from '../../ids.ts';
import { mailMode } from '../../mail/mail-mode.ts';
import { wakeMailWorker } from '../../mail/outgoing.ts';
import { type Addressee, insertNotice } from '../../repositories/notices.ts';
import { insertLetter } from '../../repositories/outbox.ts';
import { wantsMail } from './wants-mail.ts';

export interface News {
  kind: NoticeKind;
  projectId: string | null;
  /** A line: what has happened, to what. */
  title: string;
  /** A sentence or two of particulars. */
  text: string;
  /** Where it leads, and the words on the letter's button. */
  path: string;
  label: string;
}

/** Tells a person something, in the app and, if that is the person's choice, by e-mail. To be called within the
 *  transaction of its cause: both are there when the cause is, and neither when it is not. */
export async function tell(trx: Database, to: Addressee, news: News): Promise<void> {
  const { kind, projectId, title, text, path } = news;
  const at = nowText();
  await insertNotice(trx, { id: newId(), userId: to.id, projectId, kind, title, text, path, createdAt: at });
  noticeEvents.changed(to.id);
  if (mailMode() === 'off' || !(await wantsMail(trx, to.id, kind))) return;
  const action = { label: news.label, path };
  const letter = { subject: title, name: to.name, paragraphs: [`${title}.`, text], action, kind };
  await insertLetter(trx, { id: newId(), userId: to.id, recipient: to.email, letter, at });
  wakeMailWorker();
}
