import type { z } from 'zod';
import type { newPasswordSchema } from '@/api/account.ts';
import { hashPassword, passwordFits } from '../../auth/passwords.ts';
import { beginTry, endTry } from '../../auth/throttle.ts';
import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { deleteOtherSessions } from '../../repositories/sessions.ts';
import { setPasswordHash, userWithPassword } from '../../repositories/users.ts';

/** Sets a new password and signs every other session of the account out. Wrong tries at the present one slow down as
 *  at the sign-in page, since a session left open must not become a way to guess it.
 *  @param address where the request comes from. */
export async function changePassword(
  { db, caller }: Context,
  { current, next }: z.output<typeof newPasswordSchema>,
  { sessionId, address }: { sessionId: string; address: string },
): Promise<{ sessionsEnded: number }> {
  const waitMs = await beginTry(db, caller.email, address);
  if (waitMs > 0) {
    throw new Refusal('busy', `Too many tries; the next one is taken in ${Math.ceil(waitMs / 1000)} seconds.`);
  }
  const stored = await userWithPassword(db, caller.email);
  if (!(await passwordFits(current, stored?.passwordHash))) throw badFields({ current: 'the present password' });
  await endTry(db, caller.email, address);
  if (next === current) throw badFields({ next: 'a password that differs from the present one' });
  const hash = await hashPassword(next);
  return inTransaction(db, async (trx) => {
    await setPasswordHash(trx, caller.id, hash);
    const sessionsEnded = await deleteOtherSessions(trx, caller.id, sessionId);
    const content = { sessionsEnded };
    await recordEvent(trx, caller, { projectId: null, kind: 'account.password', subject: caller.id, content });
    return { sessionsEnded };
  });
}
