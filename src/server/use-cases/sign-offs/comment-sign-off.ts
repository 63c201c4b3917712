import type { NewComment, SignOffComment } from '@/api/sign-offs.ts';
import { paths } from '@/paths.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { badFields, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { commentCount, commentsOf, inConversation, insertComment } from '../../repositories/sign-off-comments.ts';
import { decidersBut, snapshotOf } from '../../repositories/sign-offs.ts';
import { tell } from '../notices/tell.ts';
import type { CodeEvidence } from './code-evidence.ts';
import { signOffToRead } from './sign-off-access.ts';

const mostComments = 500;

/** Says something on a sign-off, for good: on the whole, on a property or on a measured point of its snapshot. It goes to
 *  whoever asked, to those who spoke before, and while the sign-off is open to those who decide. */
export async function commentSignOff(
  context: Context,
  signOffId: string,
  { about, text }: NewComment,
): Promise<SignOffComment> {
  const { signOff, project } = await signOffToRead(context, signOffId);
  if (project.role === 'viewer')
    throw new Refusal('forbidden', 'A viewer reads; an engineer, reviewer or owner comments.');
  const { db, caller } = context;
  refuseUnknown(about, JSON.parse((await snapshotOf(db, signOffId))!) as CodeEvidence);
  const id = newId();
  await inTransaction(db, async (trx) => {
    if ((await commentCount(trx, signOffId)) >= mostComments)
      throw new Refusal('conflict', `A sign-off takes at most ${mostComments} comments.`);
    await insertComment(trx, { id, signOffId, about, text, createdBy: caller.id, createdAt: nowText() });
    const content = { comment: id, about };
    const { projectId, codeName } = signOff;
    await recordEvent(trx, caller, { projectId, kind: 'sign-off.commented', subject: signOffId, content });
    const title = `${caller.name} comments on the sign-off on “${codeName}”`;
    const path = paths.signOff(projectId, signOffId);
    const heard = [
      ...(await inConversation(trx, signOffId, caller.id)),
      ...(signOff.state === 'open' ? await decidersBut(trx, projectId, caller.id) : []),
    ];
    for (const person of new Map(heard.map((person) => [person.id, person])).values())
      await tell(trx, person, { kind: 'sign-off-comment', projectId, title, text, path, label: 'Open the sign-off' });
  });
  return (await commentsOf(db, signOffId)).find((comment) => comment.id === id)!;
}

function refuseUnknown(about: NewComment['about'], { properties, measurements }: CodeEvidence): void {
  if (about.kind === 'property' && !properties.some(({ key }) => key === about.key))
    throw badFields({ 'about.key': `one of ${properties.map(({ key }) => key).join(', ')}` });
  if (about.kind === 'point' && !measurements.some(({ point }) => point === about.point))
    throw badFields({ 'about.point': 'the id of a measured point of the snapshot' });
}
