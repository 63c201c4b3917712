import type { Knex } from 'knex';

/** Error rates that were measured elsewhere, a row a data set; its points, which are only ever read together, as JSON. */
const statements = [
  `CREATE TABLE measurements (
     id TEXT PRIMARY KEY NOT NULL,
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     name TEXT NOT NULL,
     file_name TEXT NOT NULL,
     n INTEGER NOT NULL CHECK (n >= 1),
     k INTEGER NOT NULL CHECK (k >= 0 AND k <= n),
     points TEXT NOT NULL CHECK (json_valid(points)),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX measurements_project ON measurements (project_id, id)',
  'CREATE INDEX measurements_author ON measurements (created_by)',
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TABLE measurements');
}
