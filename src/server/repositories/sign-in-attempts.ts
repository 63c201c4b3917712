import type { Database } from '../db/database.ts';

export interface Attempts {
  failures: number;
  lastAt: string;
  blockedUntil: string | null;
}

export async function attemptsOf(db: Database, subject: string): Promise<Attempts | undefined> {
  const row = await db('sign_in_attempts').where({ subject }).first();
  return row && { failures: row.failures, lastAt: row.last_at, blockedUntil: row.blocked_until };
}

export async function saveAttempts(db: Database, subject: string, attempts: Attempts): Promise<void> {
  const row = { failures: attempts.failures, last_at: attempts.lastAt, blocked_until: attempts.blockedUntil };
  await db('sign_in_attempts')
    .insert({ subject, ...row })
    .onConflict('subject')
    .merge(row);
}

export async function forgetAttempts(db: Database, subject: string): Promise<void> {
  await db('sign_in_attempts').where({ subject }).delete();
}

export async function forgetAttemptsBefore(db: Database, time: string): Promise<void> {
  await db('sign_in_attempts').where('last_at', '<', time).delete();
}
