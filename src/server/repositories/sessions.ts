import type { Database } from '../db/database.ts';

export async function insertSession(
  db: Database,
  session: { id: string; userId: string; createdAt: string; expiresAt: string },
): Promise<void> {
  await db('sessions').insert({
    id: session.id,
    user_id: session.userId,
    created_at: session.createdAt,
    expires_at: session.expiresAt,
  });
}

export async function deleteSession(db: Database, id: string): Promise<void> {
  await db('sessions').where({ id }).delete();
}

/** Ends a person's sessions but one. @returns how many there were. */
export const deleteOtherSessions = (db: Database, userId: string, keptId: string): Promise<number> =>
  db('sessions').where({ user_id: userId }).whereNot({ id: keptId }).delete();

export async function deleteExpiredSessions(db: Database, now: string): Promise<void> {
  await db('sessions').where('expires_at', '<=', now).delete();
}
