import { join, resolve } from 'node:path';

/** Where the database, files and the local secret live. An empty setting is refused: SQLite would open a throw-away
 *  database for it. */
export function dataDir(): string {
  const given = process.env.DATA_DIR;
  if (given !== undefined && given.trim() === '') {
    throw new Error('DATA_DIR: got ""; accepted is a folder for the database, or no setting for ./data.');
  }
  return resolve(given ?? 'data');
}

export const databaseFile = (): string => join(dataDir(), 'blockwright.sqlite');

/** Production is chosen by PUBLIC_URL; without it the server is a local bench with demo accounts. */
export const isProduction = (): boolean => process.env.PUBLIC_URL !== undefined;

/** Set by src/server/environment.mjs, which refuses a short one. */
export function authSecret(): string {
  const secret = process.env.AUTH_SECRET ?? '';
  if (secret.length < 32) throw new Error('AUTH_SECRET: a random secret of at least 32 characters is required.');
  return secret;
}
