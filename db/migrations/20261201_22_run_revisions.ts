import type { Knex } from 'knex';

/** Counts the changes of a run and remembers at which of them each of its points last changed, whoever changes them.
 *  A watcher that comes back says what it has seen, and gets what came after, a restart of the server between or not.
 *  Points inserted with their run are part of its first state and count nothing. */
const statements = [
  'ALTER TABLE runs ADD COLUMN revision INTEGER NOT NULL DEFAULT 0',
  'ALTER TABLE points ADD COLUMN revision INTEGER NOT NULL DEFAULT 0',
  'CREATE INDEX points_revision ON points (run_id, revision)',
  `CREATE TRIGGER runs_changed AFTER UPDATE ON runs WHEN NEW.revision = OLD.revision BEGIN
     UPDATE runs SET revision = revision + 1 WHERE id = NEW.id;
   END`,
  `CREATE TRIGGER points_changed AFTER UPDATE ON points WHEN NEW.revision = OLD.revision BEGIN
     UPDATE runs SET revision = revision + 1 WHERE id = NEW.run_id;
     UPDATE points SET revision = (SELECT revision FROM runs WHERE id = NEW.run_id) WHERE id = NEW.id;
   END`,
  `CREATE TRIGGER points_added AFTER INSERT ON points
   WHEN (SELECT state FROM runs WHERE id = NEW.run_id) <> 'ready' BEGIN
     UPDATE runs SET revision = revision + 1 WHERE id = NEW.run_id;
     UPDATE points SET revision = (SELECT revision FROM runs WHERE id = NEW.run_id) WHERE id = NEW.id;
   END`,
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  for (const trigger of ['points_added', 'points_changed', 'runs_changed']) await knex.raw(`DROP TRIGGER ${trigger}`);
  await knex.raw('DROP INDEX points_revision');
  for (const table of ['points', 'runs']) await knex.raw(`ALTER TABLE ${table} DROP COLUMN revision`);
}
