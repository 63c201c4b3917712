import type { Knex } from 'knex';

/** Further analyses of a code, a row each time one was asked for. What one told is kept with it where it told something
 *  new; the code's own lines are merged in the same transaction. */
const statements = [
  `CREATE TABLE analyses (
     id TEXT PRIMARY KEY NOT NULL,
     code_id TEXT NOT NULL REFERENCES codes (id) ON DELETE CASCADE,
     question TEXT NOT NULL,
     seconds INTEGER NOT NULL CHECK (seconds >= 1),
     state TEXT NOT NULL CHECK (state IN ('working', 'done', 'failed', 'cancelled')),
     answer TEXT CHECK (answer IS NULL OR json_valid(answer)),
     improved TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(improved)),
     error TEXT CHECK (error IS NULL OR json_valid(error)),
     elapsed_ms REAL,
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL,
     ended_at TEXT
   ) STRICT`,
  'CREATE INDEX analyses_code ON analyses (code_id, id)',
  'CREATE INDEX analyses_author ON analyses (created_by)',
  "CREATE UNIQUE INDEX analyses_working ON analyses (code_id, question) WHERE state = 'working'",
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TABLE analyses');
}
