import type { Knex } from 'knex';

const tallyColumns = `
     frames INTEGER NOT NULL DEFAULT 0 CHECK (frames >= 0),
     frame_errors INTEGER NOT NULL DEFAULT 0 CHECK (frame_errors >= 0),
     bit_errors INTEGER NOT NULL DEFAULT 0 CHECK (bit_errors >= 0),
     bit_errors_squared INTEGER NOT NULL DEFAULT 0 CHECK (bit_errors_squared >= 0),
     undetected INTEGER NOT NULL DEFAULT 0 CHECK (undetected >= 0),
     iterations INTEGER NOT NULL DEFAULT 0 CHECK (iterations >= 0),
     bits INTEGER NOT NULL DEFAULT 0 CHECK (bits >= 0),
     iteration_histogram TEXT NOT NULL DEFAULT '[]' CHECK (json_valid(iteration_histogram))`;

/** Runs, their points and the shards handed in. A point's tally is the sum of its shards, kept beside them in the same
 *  transaction; the primary key of shards makes posting one twice harmless. */
const statements = [
  `CREATE TABLE runs (
     id TEXT PRIMARY KEY NOT NULL,
     project_id TEXT NOT NULL REFERENCES projects (id) ON DELETE CASCADE,
     name TEXT NOT NULL,
     seed TEXT NOT NULL,
     frames_per_shard INTEGER NOT NULL CHECK (frames_per_shard >= 1),
     stop_frame_errors INTEGER NOT NULL CHECK (stop_frame_errors >= 1),
     stop_max_frames INTEGER NOT NULL CHECK (stop_max_frames >= 1),
     place TEXT NOT NULL CHECK (place IN ('browser', 'server', 'fleet')),
     state TEXT NOT NULL CHECK (state IN ('ready', 'running', 'paused', 'stopped', 'finished')),
     is_demo INTEGER NOT NULL DEFAULT 0 CHECK (is_demo IN (0, 1)),
     created_by TEXT NOT NULL REFERENCES users (id),
     created_at TEXT NOT NULL
   ) STRICT`,
  'CREATE INDEX runs_project ON runs (project_id, id)',
  'CREATE INDEX runs_author ON runs (created_by)',
  `CREATE TABLE points (
     id TEXT PRIMARY KEY NOT NULL,
     run_id TEXT NOT NULL REFERENCES runs (id) ON DELETE CASCADE,
     position INTEGER NOT NULL CHECK (position >= 0),
     code_id TEXT NOT NULL REFERENCES codes (id) ON DELETE RESTRICT,
     channel TEXT NOT NULL CHECK (json_valid(channel)),
     decoder TEXT NOT NULL CHECK (json_valid(decoder)),
     next_index INTEGER NOT NULL DEFAULT 0 CHECK (next_index >= 0),
     done INTEGER NOT NULL DEFAULT 0 CHECK (done IN (0, 1)),${tallyColumns},
     UNIQUE (run_id, position)
   ) STRICT`,
  'CREATE INDEX points_code ON points (code_id)',
  `CREATE TABLE shards (
     point_id TEXT NOT NULL REFERENCES points (id) ON DELETE CASCADE,
     shard_index INTEGER NOT NULL CHECK (shard_index >= 0),${tallyColumns},
     posted_by TEXT NOT NULL REFERENCES users (id),
     posted_at TEXT NOT NULL,
     PRIMARY KEY (point_id, shard_index),
     CHECK (frame_errors <= frames),
     CHECK (undetected <= frame_errors)
   ) STRICT, WITHOUT ROWID`,
  'CREATE INDEX shards_author ON shards (posted_by)',
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['shards', 'points', 'runs']) await knex.raw(`DROP TABLE ${table}`);
}
