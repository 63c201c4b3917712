import type { Knex } from 'knex';

/** Projects, who belongs to them, what they need, and the record of what was done. */
const statements = [
  `CREATE TABLE projects (
     id TEXT PRIMARY KEY NOT NULL,
     name TEXT NOT NULL,
     description TEXT NOT NULL DEFAULT '',
     is_demo INTEGER NOT NULL DEFAULT 0 CHECK (is_demo IN (0, 1)),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX projects_author ON projects (created_by)',
  `CREATE TABLE memberships (
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     user_id TEXT NOT NULL REFERENCES users (id) ON DELETE CASCADE,
     role TEXT NOT NULL CHECK (role IN ('owner', 'engineer', 'reviewer', 'viewer')),
     created_at TEXT NOT NULL,
     PRIMARY KEY (project_id, user_id)
   ) STRICT, WITHOUT ROWID`,
  'CREATE INDEX memberships_user ON memberships (user_id)',
  `CREATE TABLE requirements (
     project_id TEXT PRIMARY KEY NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     content TEXT NOT NULL CHECK (json_valid(content)),
     updated_by TEXT NOT NULL REFERENCES users (id),
     updated_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX requirements_author ON requirements (updated_by)',
  `CREATE TABLE audit_events (
     id TEXT PRIMARY KEY NOT NULL,
     at TEXT NOT NULL,
     user_id TEXT REFERENCES users (id),
     project_id TEXT REFERENCES projects (id),
     kind TEXT NOT NULL,
     subject TEXT NOT NULL,
     content TEXT NOT NULL CHECK (json_valid(content))
   ) STRICT`,
  'CREATE INDEX audit_events_user ON audit_events (user_id)',
  'CREATE INDEX audit_events_project ON audit_events (project_id, id)',
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['audit_events', 'requirements', 'memberships', 'projects']) {
    await knex.raw(`DROP TABLE ${table}`);
  }
}
