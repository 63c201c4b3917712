import type { Knex } from 'knex';
import { databaseFile } from './src/server/config.ts';
import { knexConfig } from './src/server/db/knex-config.ts';

/** For the command line: `npm run migrate`, `npm run migrate:rollback`, `npm run seed`. */
const config: Knex.Config = {
  ...knexConfig(databaseFile()),
  migrations: { directory: './db/migrations', extension: 'ts', loadExtensions: ['.ts'] },
  seeds: { directory: './db/seeds', extension: 'ts', loadExtensions: ['.ts'] },
};
export default config;
