import type { NewDecision, SignOff } from '@/api/sign-offs.ts';
import { paths } from '@/paths.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { askerOf, insertDecision, signOffById } from '../../repositories/sign-offs.ts';
import { tell } from '../notices/tell.ts';
import { signOffToDecide } from './sign-off-access.ts';

/** Approves or returns a sign-off, once, with a reason. */
export async function decideSignOff(context: Context, id: string, decision: NewDecision): Promise<SignOff> {
  const { projectId, digest, codeName } = await signOffToDecide(context, id);
  const { db, caller } = context;
  const { outcome, reason } = decision;
  await inTransaction(db, async (trx) => {
    const present = (await signOffById(trx, id, caller.id))!;
    if (present.state !== 'open') throw new Refusal('conflict', `This sign-off is ${present.state} already.`);
    await insertDecision(trx, { signOffId: id, outcome, reason, createdBy: caller.id, createdAt: nowText() });
    const content = { digest, reason };
    await recordEvent(trx, caller, { projectId, kind: `sign-off.${outcome}`, subject: id, content });
    const asker = await askerOf(trx, id);
    if (!asker) return;
    const title = `The sign-off on “${codeName}” is ${outcome}`;
    const path = paths.signOff(projectId, id);
    const text = `${caller.name}: ${reason}`;
    await tell(trx, asker, { kind: 'sign-off-decided', projectId, title, text, path, label: 'Open the sign-off' });
  });
  return (await signOffById(db, id, caller.id))!;
}
