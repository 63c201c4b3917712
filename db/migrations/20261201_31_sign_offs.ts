import type { Knex } from 'knex';

/** Sign-offs asked for, each with what it is about as it stood then, and the decision on each. Both are only ever added
 *  to. The digest is the SHA-256 of the snapshot's text, to the byte. */
const statements = [
  `CREATE TABLE sign_offs (
     id TEXT PRIMARY KEY NOT NULL,
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE RESTRICT,
     code_id TEXT NOT NULL REFERENCES codes (id) ON DELETE RESTRICT,
     note TEXT NOT NULL,
     snapshot TEXT NOT NULL CHECK (json_valid(snapshot)),
     digest TEXT NOT NULL UNIQUE CHECK (length(digest) = 64),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX sign_offs_project ON sign_offs (project_id, id)',
  'CREATE INDEX sign_offs_code ON sign_offs (code_id)',
  'CREATE INDEX sign_offs_author ON sign_offs (created_by)',
  `CREATE TABLE sign_off_decisions (
     sign_off_id TEXT PRIMARY KEY NOT NULL REFERENCES sign_offs (id) ON DELETE RESTRICT,
     outcome TEXT NOT NULL CHECK (outcome IN ('approved', 'returned')),
     reason TEXT NOT NULL CHECK (length(reason) >= 3),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX sign_off_decisions_author ON sign_off_decisions (created_by)',
];

const tables = ['sign_offs', 'sign_off_decisions'];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
  for (const table of tables) {
    for (const deed of ['UPDATE', 'DELETE']) {
      await knex.raw(
        `CREATE TRIGGER ${table}_no_${deed.toLowerCase()} BEFORE ${deed} ON ${table}
         BEGIN SELECT RAISE(ABORT, 'what was signed off is never changed'); END`,
      );
    }
  }
  await knex.raw(
    `CREATE TRIGGER sign_off_decisions_by_another BEFORE INSERT ON sign_off_decisions
     WHEN NEW.created_by = (SELECT created_by FROM sign_offs WHERE id = NEW.sign_off_id)
     BEGIN SELECT RAISE(ABORT, 'whoever asked for a sign-off does not decide on it'); END`,
  );
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TRIGGER sign_off_decisions_by_another');
  for (const table of tables.toReversed()) {
    // A table is emptied before it is dropped, which its own triggers would refuse.
    for (const deed of ['update', 'delete']) await knex.raw(`DROP TRIGGER ${table}_no_${deed}`);
    await knex.raw(`DROP TABLE ${table}`);
  }
}
