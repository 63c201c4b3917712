import type { Run } from '@/api/runs.ts';
import type { Database } from '../../db/database.ts';

/** Adds the points that a run's goal needs next. */
export async function replan(_trx: Database, _run: Run): Promise<void> {}
