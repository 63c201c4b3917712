import knex, { type Knex } from 'knex';
import { databaseFile, isProduction } from '../config.ts';
import { knexConfig } from './knex-config.ts';

/** A connection or a transaction. Repositories take either; inside a transaction nothing may use the connection
 *  itself, since there is only one. */
export type Database = Knex;

let connection: Database | undefined;

/** The server's database, opened at first use. */
export function database(): Database {
  connection ??= knex(knexConfig(databaseFile()));
  return connection;
}

/** One transaction, committed when `work` resolves. */
export const inTransaction = <T>(db: Database, work: (trx: Database) => Promise<T>): Promise<T> =>
  db.transaction((trx) => work(trx));

let readiness: Promise<void> | undefined;

/** Resolves when the database is migrated, the demo seeded (local mode, empty database) and interrupted jobs are
 *  taken up. A failure is told to every request until a restart of it succeeds. */
export function ready(): Promise<void> {
  readiness ??= prepare().catch((error) => {
    readiness = undefined;
    throw error;
  });
  return readiness;
}

async function prepare(): Promise<void> {
  const db = database();
  const { migrateSafely } = await import('./migrate.ts');
  const { migrationSource } = await import('./migration-source.ts');
  const applied = await migrateSafely(db, migrationSource);
  if (applied.length > 0) console.log(`Migrated the database: ${applied.join(', ')}`);
  if (!isProduction()) {
    const { seedDemo } = await import('../../../db/seeds/demo.ts');
    if (await seedDemo(db)) console.log('Seeded the demo projects.');
  }
  const { redoInterruptedJobs } = await import('../use-cases/jobs/redo-interrupted-jobs.ts');
  await redoInterruptedJobs(db);
}
