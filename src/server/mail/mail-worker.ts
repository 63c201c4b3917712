import { nowText } from '../context.ts';
import type { Database } from '../db/database.ts';
import {
  buryLetter,
  claimLetter,
  deleteSentBefore,
  dueLetters,
  markSent,
  nextDueAt,
  putOff,
  type WaitingLetter,
} from '../repositories/outbox.ts';
import { type Rendered, renderLetter } from './render-letter.ts';
import { isPermanent, mostAttempts, waitAfterMs } from './retry.ts';

/** Hands one letter to a mail server; rejects with its refusal. */
export type Send = (to: string, letter: Rendered) => Promise<unknown>;

const lettersAtOnce = 20;
/** No try takes longer; a letter whose sender died is taken up again after it. */
const longestSendMs = 120_000;
const keptSentMs = 30 * 24 * 3600_000;
/** Looks again at least this often, in case the clock was set or another process wrote a letter. */
const longestSleepMs = 60_000;

/** Sends what is in the outbox. A letter is marked as sent only after the mail server took it, so a crash between the
 *  two sends it again: at least once, never lost. */
export class MailWorker {
  private timer: NodeJS.Timeout | undefined;
  private working: Promise<void> | null = null;
  private again = false;
  private stopped = false;

  constructor(
    private readonly db: Database,
    private readonly send: Send,
    private readonly waitMs = waitAfterMs,
    private readonly leaseMs = longestSendMs,
  ) {}

  /** Looks for due letters now. May be called from within the transaction that writes one: this looks by the one
   *  connection, and so after that transaction's end. */
  wake(): void {
    if (this.stopped) return;
    this.again = true;
    this.working ??= this.work().finally(() => {
      this.working = null;
      if (this.again) this.wake();
    });
  }

  async stop(): Promise<void> {
    this.stopped = true;
    this.again = false;
    clearTimeout(this.timer);
    await this.working;
  }

  private async work(): Promise<void> {
    clearTimeout(this.timer);
    let sleepMs = longestSleepMs;
    try {
      while (this.again) {
        this.again = false;
        const due = await dueLetters(this.db, nowText(), lettersAtOnce);
        for (const letter of due) await this.tryOne(letter);
        if (due.length === lettersAtOnce) this.again = true;
      }
      await deleteSentBefore(this.db, nowText(-keptSentMs));
      const next = await nextDueAt(this.db);
      if (next) sleepMs = Math.min(longestSleepMs, Math.max(0, Date.parse(next) - Date.now()));
    } catch (error) {
      console.error('Mail: the outbox cannot be read or written just now:', error);
    }
    if (this.stopped) return;
    this.timer = setTimeout(() => this.wake(), sleepMs);
    this.timer.unref();
  }

  private async tryOne(letter: WaitingLetter): Promise<void> {
    if (this.stopped) return;
    const attempts = letter.attempts + 1;
    if (!(await claimLetter(this.db, letter, nowText(this.leaseMs)))) return;
    try {
      await this.send(letter.recipient, renderLetter(letter));
    } catch (error) {
      const message = error instanceof Error ? error.message : String(error);
      if (attempts >= mostAttempts || isPermanent(error)) {
        await buryLetter(this.db, letter.id, message, nowText());
        console.error(`Mail: letter ${letter.id} is given up after ${attempts} tries: ${message}`);
      } else await putOff(this.db, letter.id, message, nowText(this.waitMs(attempts)));
      return;
    }
    await markSent(this.db, letter.id, nowText());
  }
}
