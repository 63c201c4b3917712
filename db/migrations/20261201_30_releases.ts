import type { Knex } from 'knex';

/** Releases, the files of each, and how they ended. All three are only ever added to: what was released stays as it was
 *  released, whatever a later program thinks. Files themselves lie in the file store under their digest. */
const statements = [
  `CREATE TABLE releases (
     id TEXT PRIMARY KEY NOT NULL,
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE RESTRICT,
     number INTEGER NOT NULL CHECK (number >= 1),
     title TEXT NOT NULL,
     note TEXT NOT NULL,
     code_id TEXT NOT NULL REFERENCES codes (id) ON DELETE RESTRICT,
     fingerprint TEXT NOT NULL CHECK (length(fingerprint) = 64),
     contents TEXT NOT NULL CHECK (json_valid(contents)),
     facts TEXT NOT NULL CHECK (json_valid(facts)),
     sign_off TEXT CHECK (sign_off IS NULL OR length(sign_off) = 64),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL,
     UNIQUE (project_id, number)
   ) STRICT`,
  'CREATE INDEX releases_code ON releases (code_id)',
  'CREATE INDEX releases_author ON releases (created_by)',
  `CREATE TABLE release_files (
     release_id TEXT NOT NULL REFERENCES releases (id) ON DELETE RESTRICT,
     position INTEGER NOT NULL CHECK (position >= 0),
     name TEXT NOT NULL,
     title TEXT NOT NULL,
     media_type TEXT NOT NULL,
     size_bytes INTEGER NOT NULL CHECK (size_bytes >= 0),
     sha256 TEXT NOT NULL CHECK (length(sha256) = 64),
     is_bundle INTEGER NOT NULL CHECK (is_bundle IN (0, 1)),
     PRIMARY KEY (release_id, name)
   ) STRICT, WITHOUT ROWID`,
  `CREATE TABLE release_endings (
     id TEXT PRIMARY KEY NOT NULL,
     release_id TEXT NOT NULL REFERENCES releases (id) ON DELETE RESTRICT,
     kind TEXT NOT NULL CHECK (kind IN ('superseded', 'withdrawn')),
     reason TEXT NOT NULL CHECK (length(reason) >= 3),
     successor_id TEXT REFERENCES releases (id) ON DELETE RESTRICT,
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL,
     UNIQUE (release_id, kind),
     CHECK ((kind = 'superseded') = (successor_id IS NOT NULL))
   ) STRICT`,
  'CREATE INDEX release_endings_successor ON release_endings (successor_id)',
  'CREATE INDEX release_endings_author ON release_endings (created_by)',
];

const tables = ['releases', 'release_files', 'release_endings'];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
  for (const table of tables) {
    for (const deed of ['UPDATE', 'DELETE']) {
      await knex.raw(
        `CREATE TRIGGER ${table}_no_${deed.toLowerCase()} BEFORE ${deed} ON ${table}
         BEGIN SELECT RAISE(ABORT, 'what was released is never changed'); END`,
      );
    }
  }
  // Files belong to a release from the start: none is added once it has its bundle, which is written last.
  await knex.raw(
    `CREATE TRIGGER release_files_closed BEFORE INSERT ON release_files
     WHEN EXISTS (SELECT 1 FROM release_files WHERE release_id = NEW.release_id AND is_bundle = 1)
     BEGIN SELECT RAISE(ABORT, 'what was released is never changed'); END`,
  );
}

export async function down(knex: Knex): Promise<void> {
  for (const table of tables.toReversed()) {
    // A table is emptied before it is dropped, which its own triggers would refuse.
    for (const deed of ['update', 'delete']) await knex.raw(`DROP TRIGGER ${table}_no_${deed}`);
    await knex.raw(`DROP TABLE ${table}`);
  }
}
