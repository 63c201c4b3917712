import type { Knex } from 'knex';

/** Where shards were computed, which of them the server has computed again, and what went wrong. A quarantined source's
 *  shards leave `shards`, so that their indices are free to be computed anew, and are kept aside as evidence.
 *
 *  `runs.stopping` and `runs.goal` are the statement in full; stop_frame_errors and stop_max_frames, from before, keep
 *  the part of it that they can say. `points.counted` is the sum of the shards in index order so far: what a finished
 *  point's tally is, whoever computed its shards and in what order. */
const statements = [
  'ALTER TABLE runs ADD COLUMN stopping TEXT CHECK (stopping IS NULL OR json_valid(stopping))',
  'ALTER TABLE runs ADD COLUMN goal TEXT CHECK (goal IS NULL OR json_valid(goal))',
  'ALTER TABLE runs ADD COLUMN outcome TEXT CHECK (outcome IS NULL OR json_valid(outcome))',
  'ALTER TABLE runs ADD COLUMN spent_ms INTEGER NOT NULL DEFAULT 0',
  "CREATE INDEX runs_open ON runs (place, id) WHERE state = 'running'",
  'ALTER TABLE points ADD COLUMN counted TEXT CHECK (counted IS NULL OR json_valid(counted))',
  'ALTER TABLE points ADD COLUMN before_frames INTEGER NOT NULL DEFAULT 0',
  'ALTER TABLE points ADD COLUMN before_errors INTEGER NOT NULL DEFAULT 0',
  'ALTER TABLE points ADD COLUMN stop_reason TEXT',
  'ALTER TABLE points ADD COLUMN stop_target INTEGER',
  'ALTER TABLE points ADD COLUMN recomputed INTEGER NOT NULL DEFAULT 0',
  'ALTER TABLE points ADD COLUMN set_aside INTEGER NOT NULL DEFAULT 0',
  'ALTER TABLE points ADD COLUMN plan TEXT CHECK (plan IS NULL OR json_valid(plan))',
  'CREATE INDEX points_open ON points (run_id, position) WHERE done = 0',
  `CREATE TABLE sources (
     id TEXT PRIMARY KEY NOT NULL,
     kind TEXT NOT NULL CHECK (kind IN ('browser', 'script', 'server', 'fleet')),
     user_id TEXT REFERENCES users (id) ON DELETE SET NULL,
     name TEXT NOT NULL,
     label TEXT NOT NULL,
     created_at TEXT NOT NULL,
     quarantined_at TEXT
   ) STRICT`,
  'CREATE UNIQUE INDEX sources_name ON sources (kind, user_id, name)',
  'CREATE INDEX sources_user ON sources (user_id)',
  'ALTER TABLE shards ADD COLUMN source_id TEXT REFERENCES sources (id)',
  'CREATE INDEX shards_source ON shards (source_id)',
  `CREATE TABLE rechecks (
     point_id TEXT NOT NULL REFERENCES points (id) ON DELETE CASCADE,
     shard_index INTEGER NOT NULL CHECK (shard_index >= 0),
     state TEXT NOT NULL CHECK (state IN ('waiting', 'agreed', 'differed', 'failed')),
     PRIMARY KEY (point_id, shard_index)
   ) STRICT, WITHOUT ROWID`,
  "CREATE INDEX rechecks_waiting ON rechecks (point_id, shard_index) WHERE state = 'waiting'",
  `CREATE TABLE shard_failures (
     point_id TEXT NOT NULL REFERENCES points (id) ON DELETE CASCADE,
     shard_index INTEGER NOT NULL CHECK (shard_index >= 0),
     failures INTEGER NOT NULL CHECK (failures >= 1),
     message TEXT NOT NULL,
     last_source_id TEXT REFERENCES sources (id),
     last_at TEXT NOT NULL,
     set_aside INTEGER NOT NULL DEFAULT 0 CHECK (set_aside IN (0, 1)),
     PRIMARY KEY (point_id, shard_index)
   ) STRICT, WITHOUT ROWID`,
  'CREATE INDEX shard_failures_source ON shard_failures (last_source_id)',
  `CREATE TABLE quarantined_shards (
     point_id TEXT NOT NULL REFERENCES points (id) ON DELETE CASCADE,
     shard_index INTEGER NOT NULL CHECK (shard_index >= 0),
     source_id TEXT NOT NULL REFERENCES sources (id),
     tally TEXT NOT NULL CHECK (json_valid(tally)),
     at TEXT NOT NULL,
     PRIMARY KEY (point_id, shard_index, source_id)
   ) STRICT, WITHOUT ROWID`,
  'CREATE INDEX quarantined_shards_source ON quarantined_shards (source_id)',
  "CREATE INDEX audit_events_conflict ON audit_events (subject, id) WHERE kind = 'shard.conflict'",
];

const columns: Record<string, readonly string[]> = {
  shards: ['source_id'],
  points: [
    'counted',
    'before_frames',
    'before_errors',
    'stop_reason',
    'stop_target',
    'recomputed',
    'set_aside',
    'plan',
  ],
  runs: ['stopping', 'goal', 'outcome', 'spent_ms'],
};

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['quarantined_shards', 'shard_failures', 'rechecks']) await knex.raw(`DROP TABLE ${table}`);
  for (const index of ['audit_events_conflict', 'points_open', 'runs_open', 'shards_source'])
    await knex.raw(`DROP INDEX ${index}`);
  for (const [table, names] of Object.entries(columns)) {
    for (const name of names) await knex.raw(`ALTER TABLE ${table} DROP COLUMN ${name}`);
  }
  await knex.raw('DROP TABLE sources');
}
