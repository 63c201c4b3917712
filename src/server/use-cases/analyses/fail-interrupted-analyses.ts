import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { failOpenAnalyses } from '../../repositories/analyses.ts';

/** Analyses that a restart cut off told nothing, and are asked for again by hand. */
export async function failInterruptedAnalyses(db: Database): Promise<void> {
  const message = 'The server was restarted while this was being worked on. Nothing was kept; start it again.';
  await failOpenAnalyses(db, { code: 'interrupted', message }, nowText());
}
