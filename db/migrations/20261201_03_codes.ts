import type { Knex } from 'knex';

/** Codes, each with its matrix, and the long pieces of work that make them. `matrix` is the fingerprint's own byte
 *  sequence, deflated. */
const statements = [
  `CREATE TABLE codes (
     id TEXT PRIMARY KEY NOT NULL,
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     name TEXT NOT NULL,
     design TEXT NOT NULL CHECK (json_valid(design)),
     design_title TEXT NOT NULL,
     derivation TEXT NOT NULL CHECK (json_valid(derivation)),
     n INTEGER NOT NULL CHECK (n >= 1),
     k INTEGER NOT NULL CHECK (k >= 0 AND k <= n),
     row_count INTEGER NOT NULL CHECK (row_count >= 0),
     one_count INTEGER NOT NULL CHECK (one_count >= 0),
     fingerprint TEXT NOT NULL CHECK (length(fingerprint) = 64),
     matrix BLOB NOT NULL,
     analysis TEXT NOT NULL CHECK (json_valid(analysis)),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL,
     UNIQUE (project_id, fingerprint)
   ) STRICT`,
  'CREATE INDEX codes_author ON codes (created_by)',
  `CREATE TABLE jobs (
     id TEXT PRIMARY KEY NOT NULL,
     kind TEXT NOT NULL CHECK (kind IN ('build-code')),
     state TEXT NOT NULL CHECK (state IN ('waiting', 'working', 'done', 'failed')),
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     request TEXT NOT NULL CHECK (json_valid(request)),
     attempts INTEGER NOT NULL CHECK (attempts >= 0),
     code_id TEXT REFERENCES codes (id) ON DELETE SET NULL,
     error TEXT CHECK (error IS NULL OR json_valid(error)),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL,
     ended_at TEXT
   ) STRICT`,
  'CREATE INDEX jobs_project ON jobs (project_id)',
  'CREATE INDEX jobs_code ON jobs (code_id)',
  'CREATE INDEX jobs_author ON jobs (created_by)',
  "CREATE INDEX jobs_open ON jobs (state) WHERE state IN ('waiting', 'working')",
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['jobs', 'codes']) await knex.raw(`DROP TABLE ${table}`);
}
