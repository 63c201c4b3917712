import type { Knex } from 'knex';

/** What people say on a sign-off: on the whole, or on a property or a point of its snapshot. Only ever added to, as the
 *  sign-off itself. */
const statements = [
  `CREATE TABLE sign_off_comments (
     id TEXT PRIMARY KEY NOT NULL,
     sign_off_id TEXT NOT NULL REFERENCES sign_offs (id) ON DELETE RESTRICT,
     about TEXT NOT NULL CHECK (json_valid(about)),
     text TEXT NOT NULL CHECK (length(text) >= 1),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX sign_off_comments_of ON sign_off_comments (sign_off_id, id)',
  'CREATE INDEX sign_off_comments_author ON sign_off_comments (created_by)',
];

const deeds = ['UPDATE', 'DELETE'];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
  for (const deed of deeds) {
    await knex.raw(
      `CREATE TRIGGER sign_off_comments_no_${deed.toLowerCase()} BEFORE ${deed} ON sign_off_comments
       BEGIN SELECT RAISE(ABORT, 'what was said on a sign-off is never changed'); END`,
    );
  }
}

export async function down(knex: Knex): Promise<void> {
  // A table is emptied before it is dropped, which its own triggers would refuse.
  for (const deed of deeds) await knex.raw(`DROP TRIGGER sign_off_comments_no_${deed.toLowerCase()}`);
  await knex.raw('DROP TABLE sign_off_comments');
}
