import type { Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../db/database.ts';

const most = 200;

/** Shards that were handed in again with another tally, as the record of events keeps them, newest first. */
export async function conflictsOf(db: Database, runId: string, pointId?: string) {
  const points = db('points')
    .where({ run_id: runId, ...(pointId && { id: pointId }) })
    .select('id');
  const rows = await db('audit_events')
    .where({ kind: 'shard.conflict' })
    .whereIn('subject', points)
    .orderBy('id', 'desc')
    .limit(most)
    .select('subject', 'at', 'content');
  return rows.map((row) => {
    const { index, stored, posted } = JSON.parse(row.content) as { index: number; stored: Tally; posted: Tally };
    return { pointId: row.subject as string, at: row.at as string, index, stored, posted };
  });
}
