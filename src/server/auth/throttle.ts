import { createHash } from 'node:crypto';
import { nowText } from '../context.ts';
import { type Database, inTransaction } from '../db/database.ts';
import { attemptsOf, forgetAttempts, forgetAttemptsBefore, saveAttempts } from '../repositories/sign-in-attempts.ts';

/** After this many wrong tries for an account from an address, each further one doubles the wait. */
const freeTries = 5;
const firstWaitMs = 5_000;
const longestWaitMs = 15 * 60_000;
/** One address trying many accounts is slowed as well. */
const freeTriesOfAddress = 60;
const forgottenAfterMs = 24 * 3600_000;

interface Counter {
  subject: string;
  free: number;
}

/** What is counted for a try. Subjects are digests, so that the table keeps nobody's mistyped address. Accounts that
 *  do not exist are counted alike. */
function countersOf(email: string, address: string): Counter[] {
  const digest = (text: string) => createHash('sha256').update(text).digest('hex');
  return [
    { subject: digest(`account ${email.toLowerCase()} ${address}`), free: freeTries },
    { subject: digest(`address ${address}`), free: freeTriesOfAddress },
  ];
}

/** Counts a try as failed before its password is looked at, so that tries made at once do not slip through together.
 *  @returns milliseconds to wait, or 0 when the try may go on. */
export async function beginTry(db: Database, email: string, address: string): Promise<number> {
  return inTransaction(db, async (trx) => {
    const now = Date.now();
    const counters = countersOf(email, address);
    const known = await Promise.all(counters.map(({ subject }) => attemptsOf(trx, subject)));
    const waitsMs = known.map((attempts) => Date.parse(attempts?.blockedUntil ?? '') - now);
    const waitMs = Math.max(0, ...waitsMs.filter((ms) => ms > 0));
    if (waitMs > 0) return waitMs;
    for (const [i, { subject, free }] of counters.entries()) {
      const failures = (known[i]?.failures ?? 0) + 1;
      const blockMs = failures < free ? 0 : Math.min(longestWaitMs, firstWaitMs * 2 ** (failures - free));
      const blockedUntil = blockMs > 0 ? nowText(blockMs) : null;
      await saveAttempts(trx, subject, { failures, lastAt: nowText(), blockedUntil });
    }
    return 0;
  });
}

/** A right password clears the account's count from that address, and takes back its share of the address's. */
export async function endTry(db: Database, email: string, address: string): Promise<void> {
  await inTransaction(db, async (trx) => {
    const [account, whole] = countersOf(email, address) as [Counter, Counter];
    const failures = (await attemptsOf(trx, account.subject))?.failures ?? 0;
    await forgetAttempts(trx, account.subject);
    const attempts = await attemptsOf(trx, whole.subject);
    if (attempts) {
      const left = Math.max(0, attempts.failures - failures);
      await saveAttempts(trx, whole.subject, { ...attempts, failures: left, blockedUntil: null });
    }
    await forgetAttemptsBefore(trx, nowText(-forgottenAfterMs));
  });
}
