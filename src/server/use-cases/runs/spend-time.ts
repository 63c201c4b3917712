import type { Run } from '@/api/runs.ts';
import type { Database } from '../../db/database.ts';
import { leaseMs } from '../../jobs/lease-book.ts';
import { closeOpenPoints } from '../../repositories/points.ts';
import { addTimeSpent } from '../../repositories/runs.ts';

/** When something was last heard of a run, by a clock that is never set. */
const heard = new Map<string, number>();

/** Counts the time a run is worked on, from one word of its workers to the next, and closes what is open when it is
 *  used up. A silence longer than a lease is no work: the tab was closed, the laptop slept.
 *  @returns whether the time is over. */
export async function spendTime(trx: Database, run: Run): Promise<boolean> {
  const { seconds } = run.stopping;
  if (seconds === undefined) return false;
  const now = performance.now();
  const since = now - (heard.get(run.id) ?? now);
  heard.set(run.id, now);
  const spentMs = await addTimeSpent(trx, run.id, Math.min(since, leaseMs));
  if (spentMs < seconds * 1000) return false;
  heard.delete(run.id);
  await closeOpenPoints(trx, run.id, 'time');
  return true;
}
