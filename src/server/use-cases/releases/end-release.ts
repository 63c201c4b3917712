import type { NewEnding, Release } from '@/api/releases.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { isId, newId } from '../../ids.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { insertEnding, releaseById } from '../../repositories/releases.ts';
import { releaseToEnd } from './release-access.ts';

/** Records that a release is superseded by a later one, or withdrawn, and why. The release itself stays as it was; what
 *  was withdrawn cannot be superseded any more, and nothing is undone. */
export async function endRelease(context: Context, releaseId: string, ending: NewEnding): Promise<Release> {
  const release = await releaseToEnd(context, releaseId);
  const { db, caller } = context;
  const successorId = ending.kind === 'superseded' ? ending.successorId : null;
  await inTransaction(db, async (trx) => {
    const present = (await releaseById(trx, releaseId))!;
    if (present.state === 'withdrawn' || present.state === ending.kind) {
      throw new Refusal('conflict', `Release ${present.number} is ${present.state} already.`);
    }
    if (successorId !== null) {
      const successor = isId(successorId) ? await releaseById(trx, successorId) : undefined;
      if (successor?.projectId !== release.projectId || successor.number <= release.number)
        throw badFields({ successorId: 'the id of a later release of this project' });
      if (successor.state === 'withdrawn') throw badFields({ successorId: 'a release that is not withdrawn itself' });
    }
    const { kind, reason } = ending;
    const row = { id: newId(), releaseId, kind, reason, successorId, createdBy: caller.id, createdAt: nowText() };
    await insertEnding(trx, row);
    const { projectId, number } = release;
    const content = { number, reason, ...(successorId && { successorId }) };
    await recordEvent(trx, caller, { projectId, kind: `release.${kind}`, subject: releaseId, content });
  });
  return (await releaseById(db, releaseId))!;
}
