import type { Knex } from 'knex';

/** Who may come in: users, their sessions, and wrong tries at signing in. Times are ISO 8601 text in UTC. */
const statements = [
  `CREATE TABLE users (
     id TEXT PRIMARY KEY NOT NULL,
     email TEXT NOT NULL UNIQUE CHECK (email = lower(email)),
     name TEXT NOT NULL,
     role TEXT NOT NULL CHECK (role IN ('administrator', 'member', 'guest')),
     password_hash TEXT,
     is_demo INTEGER NOT NULL DEFAULT 0 CHECK (is_demo IN (0, 1)),
     created_at TEXT NOT NULL
   ) STRICT`,
  `CREATE TABLE sessions (
     id TEXT PRIMARY KEY NOT NULL,
     user_id TEXT NOT NULL REFERENCES users (id) ON DELETE CASCADE,
     created_at TEXT NOT NULL,
     expires_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX sessions_user ON sessions (user_id)',
  'CREATE INDEX sessions_expiry ON sessions (expires_at)',
  `CREATE TABLE sign_in_attempts (
     subject TEXT PRIMARY KEY NOT NULL,
     failures INTEGER NOT NULL CHECK (failures >= 0),
     last_at TEXT NOT NULL,
     blocked_until TEXT
   ) STRICT`,
  'CREATE INDEX sign_in_attempts_age ON sign_in_attempts (last_at)',
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['sign_in_attempts', 'sessions', 'users']) await knex.raw(`DROP TABLE ${table}`);
}
