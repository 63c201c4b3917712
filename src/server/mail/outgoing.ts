import type { Database } from '../db/database.ts';
import { startLocalMailbox } from './local-mailbox.ts';
import { mailMode } from './mail-mode.ts';
import { MailWorker } from './mail-worker.ts';
import { sendBySmtp } from './smtp.ts';

let worker: MailWorker | undefined;

/** Begins sending what waits in the outbox, letters of before a crash too. Without a way to send nothing is started,
 *  and nothing is written either (see use-cases/notices/tell.ts). */
export async function startSendingMail(db: Database): Promise<void> {
  if (worker || mailMode() === 'off') return;
  const url = process.env.SMTP_URL ?? (await startLocalMailbox());
  worker = new MailWorker(db, sendBySmtp(url));
  worker.wake();
}

/** Says that a letter was written. */
export const wakeMailWorker = (): void => worker?.wake();
