import type { Point, Run } from '@/api/runs.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { notFound } from '../../refusal.ts';
import { pointsChangedSince } from '../../repositories/points.ts';
import { runById } from '../../repositories/runs.ts';
import { extraIndicesOf } from '../../repositories/shards.ts';
import { shownPoint } from './shown-point.ts';

/** Up to so many points a watcher who has seen nothing yet is told all; of a larger run it fetches what it shows. */
const mostAtFirst = 2000;

/** A run as it stands, and its points that have changed after a revision, read in one transaction so that the two
 *  belong together. A revision of the future, which a restored backup leaves behind, counts as none. Rights are the
 *  caller's to check. */
export function runNews(
  db: Database,
  runId: string,
  since: number | undefined,
): Promise<{ run: Run; points: Point[] }> {
  return inTransaction(db, async (trx) => {
    const run = await runById(trx, runId);
    if (!run) throw notFound('run');
    const known = since !== undefined && since <= run.revision ? since : -1;
    if (known < 0 && run.pointCount > mostAtFirst) return { run, points: [] };
    const points = await pointsChangedSince(trx, runId, known);
    const extra = await extraIndicesOf(trx, points);
    return { run, points: points.map((point) => shownPoint(point, extra.get(point.id) ?? [])) };
  });
}
