import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import type { Knex } from 'knex';

interface RawConnection {
  open: boolean;
  pragma(text: string): unknown;
  close(): void;
}

/** One connection with our pragmas; shared by the server, the command line and tests. */
export function knexConfig(filename: string): Knex.Config {
  mkdirSync(dirname(filename), { recursive: true, mode: 0o700 });
  return {
    client: 'better-sqlite3',
    connection: { filename },
    useNullAsDefault: true,
    pool: {
      min: 1,
      max: 1,
      afterCreate(connection: RawConnection, done: (error: Error | null, connection: RawConnection) => void) {
        try {
          connection.pragma('busy_timeout = 5000');
          connection.pragma('journal_mode = WAL');
          // NORMAL could lose an acknowledged commit on power loss.
          connection.pragma('synchronous = FULL');
          connection.pragma('foreign_keys = ON');
          process.once('exit', () => connection.open && connection.close());
          done(null, connection);
        } catch (error) {
          done(error as Error, connection);
        }
      },
    },
  };
}
