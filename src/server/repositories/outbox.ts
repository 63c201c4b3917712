import type { DeadLetter } from '@/api/notices.ts';
import type { Database } from '../db/database.ts';
import type { Letter } from '../mail/letter.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface WaitingLetter {
  id: string;
  userId: string | null;
  recipient: string;
  letter: Letter;
  attempts: number;
}

export async function insertLetter(
  db: Database,
  row: { id: string; userId: string | null; recipient: string; letter: Letter; at: string },
): Promise<void> {
  await db('outbox').insert({
    id: row.id,
    user_id: row.userId,
    recipient: row.recipient,
    content: JSON.stringify(row.letter),
    state: 'waiting',
    next_at: row.at,
    created_at: row.at,
  });
}

/** Letters that are due, the longest waiting first. */
export async function dueLetters(db: Database, now: string, limit: number): Promise<WaitingLetter[]> {
  const rows = await db('outbox')
    .where({ state: 'waiting' })
    .where('next_at', '<=', now)
    .orderBy('next_at')
    .limit(limit);
  return rows.map(toWaiting);
}

/** When the next letter is due; undefined when none waits. */
export async function nextDueAt(db: Database): Promise<string | undefined> {
  const row = await db('outbox').where({ state: 'waiting' }).min({ at: 'next_at' }).first();
  return row?.at ?? undefined;
}

/** Counts a try and keeps the letter to the caller until `nextAt`, so that of two servers on one database only one
 *  tries.
 *  @returns whether this caller may try. */
export async function claimLetter(db: Database, letter: WaitingLetter, nextAt: string): Promise<boolean> {
  const claimed = await db('outbox')
    .where({ id: letter.id, state: 'waiting', attempts: letter.attempts })
    .update({ attempts: letter.attempts + 1, next_at: nextAt });
  return claimed === 1;
}

export async function markSent(db: Database, id: string, at: string): Promise<void> {
  await db('outbox').where({ id }).update({ state: 'sent', ended_at: at, last_error: null });
}

/** After a try that failed for now. */
export async function putOff(db: Database, id: string, error: string, nextAt: string): Promise<void> {
  await db('outbox').where({ id }).update({ last_error: error, next_at: nextAt });
}

export async function buryLetter(db: Database, id: string, error: string, at: string): Promise<void> {
  await db('outbox').where({ id }).update({ state: 'dead', last_error: error, ended_at: at });
}

/** Undeliverable letters, newest first. */
export async function deadLetters(db: Database, page: PageRequest): Promise<DeadLetter[]> {
  const query = db('outbox').where({ state: 'dead' }).orderBy('id', 'desc').limit(page.limit);
  if (page.after) query.where('id', '<', page.after);
  return (await query).map(toDead);
}

/** Lets a dead letter be tried anew. @returns whether there was one. */
export async function reviveLetter(db: Database, id: string, at: string): Promise<boolean> {
  const fresh = { state: 'waiting', attempts: 0, next_at: at, ended_at: null };
  return (await db('outbox').where({ id, state: 'dead' }).update(fresh)) === 1;
}

/** @returns whether there was such a dead letter. */
export const deleteDeadLetter = async (db: Database, id: string): Promise<boolean> =>
  (await db('outbox').where({ id, state: 'dead' }).delete()) === 1;

/** Letters sent long ago are not kept. */
export async function deleteSentBefore(db: Database, time: string): Promise<void> {
  await db('outbox').where({ state: 'sent' }).where('ended_at', '<', time).delete();
}

function toWaiting(row: Row): WaitingLetter {
  return {
    id: row.id!,
    userId: row.user_id ?? null,
    recipient: row.recipient!,
    letter: JSON.parse(row.content!),
    attempts: row.attempts!,
  };
}

const toDead = (row: Row): DeadLetter => ({
  id: row.id!,
  recipient: row.recipient!,
  subject: (JSON.parse(row.content!) as Letter).subject,
  attempts: row.attempts!,
  lastError: row.last_error ?? '',
  createdAt: row.created_at!,
  endedAt: row.ended_at!,
});
