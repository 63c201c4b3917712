import type { Knex } from 'knex';

/** What people are told, by which way they want it, and the letters that wait to be sent. A letter is kept as content,
 *  not as finished text: its links are made when it is sent. `next_at` is when a waiting one is due. */
const statements = [
  `CREATE TABLE notices (
     id TEXT PRIMARY KEY NOT NULL,
     user_id TEXT NOT NULL REFERENCES users (id) ON DELETE CASCADE,
     project_id TEXT REFERENCES projects (id) ON DELETE CASCADE,
     kind TEXT NOT NULL,
     title TEXT NOT NULL,
     text TEXT NOT NULL,
     path TEXT NOT NULL CHECK (path LIKE '/%'),
     created_at TEXT NOT NULL,
     read_at TEXT
   ) STRICT`,
  'CREATE INDEX notices_user ON notices (user_id, id)',
  'CREATE INDEX notices_project ON notices (project_id)',
  'CREATE INDEX notices_unread ON notices (user_id) WHERE read_at IS NULL',
  `CREATE TABLE notice_choices (
     user_id TEXT NOT NULL REFERENCES users (id) ON DELETE CASCADE,
     kind TEXT NOT NULL,
     by_mail INTEGER NOT NULL CHECK (by_mail IN (0, 1)),
     PRIMARY KEY (user_id, kind)
   ) STRICT, WITHOUT ROWID`,
  `CREATE TABLE outbox (
     id TEXT PRIMARY KEY NOT NULL,
     user_id TEXT REFERENCES users (id) ON DELETE CASCADE,
     recipient TEXT NOT NULL,
     content TEXT NOT NULL CHECK (json_valid(content)),
     state TEXT NOT NULL CHECK (state IN ('waiting', 'sent', 'dead')),
     attempts INTEGER NOT NULL DEFAULT 0 CHECK (attempts >= 0),
     next_at TEXT NOT NULL,
     last_error TEXT,
     created_at TEXT NOT NULL,
     ended_at TEXT
   ) STRICT`,
  'CREATE INDEX outbox_user ON outbox (user_id)',
  "CREATE INDEX outbox_due ON outbox (next_at) WHERE state = 'waiting'",
  "CREATE INDEX outbox_dead ON outbox (id) WHERE state = 'dead'",
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['outbox', 'notice_choices', 'notices']) await knex.raw(`DROP TABLE ${table}`);
}
