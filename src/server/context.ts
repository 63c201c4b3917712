import type { Database } from './db/database.ts';

/** A signed-in person, as the database says at this request. */
export interface Caller {
  id: string;
  email: string;
  name: string;
  role: 'administrator' | 'member' | 'guest';
}

/** What a use case works with. */
export interface Context {
  db: Database;
  caller: Caller;
}

/** The present, as the database keeps it. */
export const nowText = (offsetMs = 0): string => new Date(Date.now() + offsetMs).toISOString();
