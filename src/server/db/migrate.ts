import { existsSync, renameSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import type { Knex } from 'knex';

/** Brings the database up to date, all or nothing: knex runs the pending migrations in one transaction. A database
 *  that holds something is first copied aside, to `before-migration.sqlite` in its folder, so that even a migration
 *  that succeeds and proves wrong can be undone by hand.
 *  @returns names of the migrations applied. */
export async function migrateSafely(db: Knex, migrationSource: Knex.MigrationSource<string>): Promise<string[]> {
  const [done, pending] = (await db.migrate.list({ migrationSource })) as [unknown[], string[]];
  if (pending.length === 0) return [];
  if (done.length > 0) await copyAside(db);
  const [, applied] = (await db.migrate.latest({ migrationSource })) as [number, string[]];
  return applied;
}

async function copyAside(db: Knex): Promise<void> {
  const { filename } = db.client.config.connection as { filename: string };
  const target = join(dirname(filename), 'before-migration.sqlite');
  const unfinished = `${target}.partial`;
  if (existsSync(unfinished)) rmSync(unfinished);
  await db.raw('VACUUM INTO ?', [unfinished]);
  renameSync(unfinished, target);
}
