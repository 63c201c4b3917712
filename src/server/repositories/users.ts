import type { Caller } from '../context.ts';
import type { Database } from '../db/database.ts';

interface UserRow extends Caller {
  password_hash: string | null;
  is_demo: number;
  created_at: string;
}

const callerColumns = ['users.id', 'users.email', 'users.name', 'users.role'] as const;

export interface NewUser extends Caller {
  passwordHash: string | null;
  isDemo: boolean;
  createdAt: string;
}

export async function insertUser(db: Database, user: NewUser): Promise<void> {
  await db('users').insert({
    id: user.id,
    email: user.email.toLowerCase(),
    name: user.name,
    role: user.role,
    password_hash: user.passwordHash,
    is_demo: user.isDemo ? 1 : 0,
    created_at: user.createdAt,
  });
}

export async function userWithPassword(
  db: Database,
  email: string,
): Promise<(Caller & { passwordHash: string | null }) | undefined> {
  const row = await db<UserRow>('users').where({ email: email.toLowerCase() }).first();
  if (!row) return undefined;
  return { id: row.id, email: row.email, name: row.name, role: row.role, passwordHash: row.password_hash };
}

/** The user of a session that stands, or nothing. */
export async function userOfSession(db: Database, sessionId: string, now: string): Promise<Caller | undefined> {
  return db('sessions')
    .join('users', 'users.id', 'sessions.user_id')
    .where('sessions.id', sessionId)
    .where('sessions.expires_at', '>', now)
    .first<Caller>(callerColumns);
}

export async function renameUser(db: Database, id: string, name: string): Promise<void> {
  await db('users').where({ id }).update({ name });
}

export async function setPasswordHash(db: Database, id: string, passwordHash: string): Promise<void> {
  await db('users').where({ id }).update({ password_hash: passwordHash });
}

export async function anyUser(db: Database): Promise<boolean> {
  return (await db('users').first('id')) !== undefined;
}

/** Addresses of the seeded accounts, for the sign-in page of local mode. */
export async function demoEmails(db: Database): Promise<string[]> {
  return db('users').where({ is_demo: 1 }).orderBy('id').pluck('email');
}
