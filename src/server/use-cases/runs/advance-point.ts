import type { Stopping } from '@/api/runs.ts';
import { mergeTallies, type Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../../db/database.ts';
import { Refusal } from '../../refusal.ts';
import { type StoredPoint, savePointProgress } from '../../repositories/points.ts';
import { shardIndicesFrom } from '../../repositories/shards.ts';

/** Adds tallies just stored to their point: its sum, the unbroken beginning of its indices, and whether the stopping
 *  rule is met. */
export async function advancePoint(
  db: Database,
  point: StoredPoint,
  tallies: readonly Tally[],
  stopping: Stopping,
): Promise<void> {
  const tally = tallies.reduce(mergeTallies, point.tally);
  refuseInexact(tally);
  let nextIndex = point.nextIndex;
  for (const index of await shardIndicesFrom(db, point.id, nextIndex)) {
    if (index !== nextIndex) break;
    nextIndex++;
  }
  await savePointProgress(db, point.id, { tally, nextIndex, done: stoppingRuleMet(tally, stopping) });
}

export const stoppingRuleMet = (tally: Tally, stopping: Stopping): boolean =>
  tally.frameErrors >= stopping.frameErrors || tally.frames >= stopping.maxFrames;

/** Sums are kept as exact integers or not at all. */
function refuseInexact(tally: Tally): void {
  for (const [name, value] of Object.entries(tally)) {
    if (typeof value === 'number' && !Number.isSafeInteger(value)) {
      throw new Refusal('limit', `${name}: the point's sum would pass 2^53 and no longer be exact; stop the run here.`);
    }
  }
}
