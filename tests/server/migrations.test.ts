import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { migrateSafely } from '@/server/db/migrate.ts';
import { migrationSource } from '@/server/db/migration-source.ts';
import { root } from './built-server.ts';
import { furnishedScratch, openScratch } from './scratch-database.ts';

const schemaOf = (db: Knex): Promise<unknown[]> =>
  db('sqlite_schema').select('type', 'name', 'sql').whereNot('name', 'like', 'sqlite_%').orderBy('name');

/** The real migrations, then others. */
function extended(more: Record<string, (knex: Knex) => Promise<void>>): Knex.MigrationSource<string> {
  const { getMigrations, getMigrationName, getMigration } = migrationSource;
  return {
    getMigrations: async (extensions) => [...(await getMigrations(extensions)), ...Object.keys(more)],
    getMigrationName: (name) => (name in more ? name : getMigrationName(name)),
    getMigration: async (name) => (more[name] ? { up: more[name], down: async () => {} } : getMigration(name)),
  };
}

describe('migrations', () => {
  it('go up and down again without a trace, and up once more', async () => {
    const { db } = openScratch();
    const applied = await migrateSafely(db, migrationSource);
    expect(applied).toEqual(readdirSync(join(root, 'db', 'migrations')).sort());
    const full = await schemaOf(db);
    await db.migrate.rollback({ migrationSource }, true);
    expect((await schemaOf(db)).filter((row) => !/knex_/.test((row as { name: string }).name))).toEqual([]);
    await migrateSafely(db, migrationSource);
    expect(await schemaOf(db)).toEqual(full);
    expect(await migrateSafely(db, migrationSource)).toEqual([]);
    await db.destroy();
  });

  it('that fail leave the old database as it was, and beside it the copy made before', async () => {
    const { db, dataDir, projectId } = await furnishedScratch();
    const before = await schemaOf(db);
    const failing = extended({
      '20990101_first.ts': async (knex) => {
        await knex.raw('CREATE TABLE later (id TEXT) STRICT');
        await knex('projects').update({ name: 'Spoilt' });
      },
      '20990102_second.ts': async (knex) => {
        await knex.raw('DROP TABLE shards');
        throw new Error('the disk is full');
      },
    });
    await expect(migrateSafely(db, failing)).rejects.toThrow('the disk is full');
    expect(await schemaOf(db)).toEqual(before);
    expect((await db('projects').where({ id: projectId }).first()).name).toBe('Scratch');
    expect(await db('knex_migrations').where('name', 'like', '2099%')).toEqual([]);
    expect((await db('knex_migrations_lock').first()).is_locked).toBe(0);
    await db.destroy();
    const copy = new Database(join(dataDir, 'before-migration.sqlite'), { readonly: true });
    expect(copy.prepare('SELECT name FROM projects').pluck().get()).toBe('Scratch');
    copy.close();
  });

  it('copy nothing aside for a new database', async () => {
    const { db, dataDir } = openScratch();
    await migrateSafely(db, migrationSource);
    expect(existsSync(join(dataDir, 'before-migration.sqlite'))).toBe(false);
    await db.destroy();
  });
});

describe('the schema', () => {
  it('has STRICT tables, an index on every foreign key, and our pragmas', async () => {
    const { db } = await furnishedScratch();
    const tables = (await db.raw('PRAGMA table_list')) as { name: string; strict: number; schema: string }[];
    const own = tables.filter(({ name, schema }) => schema === 'main' && !/^(sqlite_|knex_)/.test(name));
    expect(own.length).toBeGreaterThanOrEqual(12);
    for (const { name, strict } of own) expect([name, strict]).toEqual([name, 1]);
    for (const { name } of own) {
      const first = new Set<string>();
      for (const index of await db.raw(`PRAGMA index_list(${name})`)) {
        first.add((await db.raw(`PRAGMA index_info(${index.name})`))[0].name);
      }
      const key = (await db.raw(`PRAGMA table_info(${name})`)).find((column: { pk: number }) => column.pk === 1);
      if (key) first.add(key.name);
      for (const { from } of await db.raw(`PRAGMA foreign_key_list(${name})`)) {
        expect(first, `${name}.${from}`).toContain(from);
      }
    }
    expect(await db.raw('PRAGMA journal_mode')).toEqual([{ journal_mode: 'wal' }]);
    expect(await db.raw('PRAGMA synchronous')).toEqual([{ synchronous: 2 }]);
    expect(await db.raw('PRAGMA foreign_keys')).toEqual([{ foreign_keys: 1 }]);
    expect(await db.raw('PRAGMA busy_timeout')).toEqual([{ timeout: 5000 }]);
    await db.destroy();
  });
});
