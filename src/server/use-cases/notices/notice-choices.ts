import type { z } from 'zod';
import { type NoticeChoices, type NoticeKind, type noticeChoicesPatchSchema, noticeKinds } from '@/api/notices.ts';
import type { Context } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { mailMode } from '../../mail/mail-mode.ts';
import { addressee, saveChoice } from '../../repositories/notices.ts';
import { wantsMail } from './wants-mail.ts';

/** Of every kind, whether the caller gets it by mail. */
export async function noticeChoices({ db, caller }: Context): Promise<NoticeChoices> {
  const kinds = Object.keys(noticeKinds) as NoticeKind[];
  const choices = await Promise.all(
    kinds.map(async (kind) => ({ kind, byMail: await wantsMail(db, caller.id, kind) })),
  );
  return { mail: mailMode(), choices };
}

export async function chooseNotices(
  context: Context,
  { choices }: z.output<typeof noticeChoicesPatchSchema>,
): Promise<NoticeChoices> {
  await inTransaction(context.db, async (trx) => {
    for (const { kind, byMail } of choices) await saveChoice(trx, context.caller.id, kind, byMail);
  });
  return noticeChoices(context);
}

/** What the signed link of a letter does; its reader need not be signed in. @returns whether there is such a person. */
export async function turnMail(db: Database, userId: string, kind: NoticeKind, byMail: boolean): Promise<boolean> {
  if (!(await addressee(db, userId))) return false;
  await saveChoice(db, userId, kind, byMail);
  return true;
}
