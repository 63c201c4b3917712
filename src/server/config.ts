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

export interface S3Settings {
  /** Absent for Amazon's own addresses. */
  endpoint?: string;
  bucket: string;
  /** What every key begins with: empty, or ending in a slash. */
  prefix: string;
  region: string;
  accessKeyId: string;
  secretAccessKey: string;
}

/** Where released files go, when not into DATA_DIR; checked by src/server/environment.mjs at the start. */
export function s3Settings(env: NodeJS.ProcessEnv = process.env): S3Settings | undefined {
  const bucket = env.S3_BUCKET;
  if (!bucket) return undefined;
  const prefix = env.S3_PREFIX ?? '';
  return {
    ...(env.S3_ENDPOINT && { endpoint: env.S3_ENDPOINT }),
    bucket,
    prefix: prefix === '' || prefix.endsWith('/') ? prefix : `${prefix}/`,
    region: env.S3_REGION ?? 'us-east-1',
    accessKeyId: env.S3_ACCESS_KEY_ID ?? '',
    secretAccessKey: env.S3_SECRET_ACCESS_KEY ?? '',
  };
}

/** The share of shards from browsers, scripts and the fleet that the server computes again; checked by
 *  src/server/environment.mjs at the start. 0 takes every result as it comes. */
export const recheckShare = (): number => Number(process.env.RECHECK_SHARE ?? '0.02');

/** Threads that compute shards; all cores less one unless SIMULATION_THREADS says otherwise. */
export const workerThreads = (): number | undefined =>
  process.env.SIMULATION_THREADS ? Number(process.env.SIMULATION_THREADS) : undefined;

export const redisUrl = (): string | undefined => process.env.REDIS_URL || undefined;
