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

/** Fills an empty database with the demo; false when there was something in it. Handed in by the middleware, because
 *  the seeds themselves are made with this server's repositories. */
export type Seeder = (db: Database) => Promise<boolean>;

let readiness: Promise<void> | undefined;

/** Resolves when the database is migrated, the demo seeded (local mode, empty database) interrupted jobs are taken
 *  up and half received files removed. After a failure the next request tries again. */
export function ready(seedDemo: Seeder): Promise<void> {
  readiness ??= prepare(seedDemo).catch((error) => {
    readiness = undefined;
    throw error;
  });
  return readiness;
}

async function prepare(seedDemo: Seeder): Promise<void> {
  const db = database();
  const { migrateSafely } = await import('./migrate.ts');
  const { migrationSource } = await import('./migration-source.ts');
  const applied = await migrateSafely(db, migrationSource);
  if (applied.length > 0) console.log(`Migrated the database: ${applied.join(', ')}`);
  if (!isProduction() && (await seedDemo(db))) console.log('Seeded the demo projects.');
  const { redoInterruptedJobs } = await import('../use-cases/jobs/redo-interrupted-jobs.ts');
  await redoInterruptedJobs(db);
  const { failInterruptedAnalyses } = await import('../use-cases/analyses/fail-interrupted-analyses.ts');
  await failInterruptedAnalyses(db);
  const { startSendingMail } = await import('../mail/outgoing.ts');
  await startSendingMail(db);
  const { startWorking } = await import('../jobs/start-working.ts');
  await startWorking(db);
  const { removeLeftovers } = await import('../files/receive-file.ts');
  await removeLeftovers();
}
