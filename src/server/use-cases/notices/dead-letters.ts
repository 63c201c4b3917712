import type { DeadLetter } from '@/api/notices.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { isId } from '../../ids.ts';
import { wakeMailWorker } from '../../mail/outgoing.ts';
import { notFound, Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { deadLetters, deleteDeadLetter, reviveLetter } from '../../repositories/outbox.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';

function demandAdministrator({ caller }: Context): void {
  if (caller.role !== 'administrator') {
    throw new Refusal('forbidden', 'Undeliverable mail is the administrator’s to see; ask one.');
  }
}

/** Letters that could not be delivered, with the mail server's last word on each. */
export async function listDeadLetters(
  context: Context,
  query: { after?: string; limit?: number },
): Promise<{ letters: DeadLetter[]; next?: string }> {
  demandAdministrator(context);
  const request = pageRequest(query);
  const { items, next } = pageOf(await deadLetters(context.db, request), request);
  return { letters: items, ...(next && { next }) };
}

/** Tries a dead letter anew, from the first attempt. */
export async function retryDeadLetter(context: Context, id: string): Promise<void> {
  await change(context, id, 'mail.retried', (trx) => reviveLetter(trx, id, nowText()));
  wakeMailWorker();
}

export async function discardDeadLetter(context: Context, id: string): Promise<void> {
  await change(context, id, 'mail.discarded', (trx) => deleteDeadLetter(trx, id));
}

async function change(
  context: Context,
  id: string,
  kind: string,
  work: (trx: Context['db']) => Promise<boolean>,
): Promise<void> {
  demandAdministrator(context);
  await inTransaction(context.db, async (trx) => {
    if (!isId(id) || !(await work(trx))) throw notFound('undeliverable letter');
    await recordEvent(trx, context.caller, { projectId: null, kind, subject: id });
  });
}
