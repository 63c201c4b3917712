import type { Run } from '@/api/runs.ts';
import { framesLeft } from '@/core/simulation/planning.ts';
import type { Database } from '../../db/database.ts';
import { leaseBook } from '../../jobs/lease-book.ts';
import { openPointsOf, type StoredPoint } from '../../repositories/points.ts';
import { setAsideIndices } from '../../repositories/shard-failures.ts';
import { shardIndicesFrom } from '../../repositories/shards.ts';
import { ruleOf, shardCap } from './recount-point.ts';

export interface Lease {
  point: StoredPoint;
  index: number;
}

/** Points looked at for one request; a larger run's later points have their turn when these are done. */
const pointsAtOnce = 64;

/** Hands out shards that nobody has, in the order of points and indices. At first no more of a point than it is expected
 *  to need; when there is nothing else to do, as many as its rule allows, since some of them may be needed after all.
 *  @param ms how long they are the holder's. */
export async function takeLeases(
  db: Database,
  run: Run,
  { count, holder, ms }: { count: number; holder: string; ms?: number },
): Promise<Lease[]> {
  const points = await openPointsOf(db, run.id, pointsAtOnce);
  const leases: Lease[] = [];
  const taken = await Promise.all(points.map(async (point) => new Set(await takenIndices(db, point))));
  for (const wanted of [expectedShards, allShards]) {
    points.forEach((point, i) => {
      const most = Math.min(count - leases.length, wanted(run, point) - taken[i]!.size - leaseBook.countOut(point.id));
      for (const index of freeIndices(run, point, taken[i]!, most)) {
        leaseBook.take(point.id, index, holder, ms);
        leases.push({ point, index });
      }
    });
    if (leases.length === count) break;
  }
  return leases;
}

/** Stored ahead of a gap, or set aside. */
async function takenIndices(db: Database, point: StoredPoint): Promise<number[]> {
  const stored = await shardIndicesFrom(db, point.id, point.nextIndex);
  const aside = point.setAside > 0 ? await setAsideIndices(db, point.id) : [];
  return [...stored, ...aside.filter((index) => index >= point.nextIndex)];
}

/** Until something is known of a point it gets two shards. */
function expectedShards(run: Run, point: StoredPoint): number {
  if (point.plan) return allShards(run, point);
  if (point.counted.frames === 0) return 2;
  const { expected } = framesLeft(point.counted, ruleOf(run, point));
  return Math.max(1, Math.ceil(expected / run.framesPerShard));
}

const allShards = (run: Run, point: StoredPoint): number => shardCap(run, point) - point.nextIndex;

function freeIndices(run: Run, point: StoredPoint, taken: ReadonlySet<number>, most: number): number[] {
  const free: number[] = [];
  const cap = shardCap(run, point);
  for (let index = point.nextIndex; index < cap && free.length < most; index++) {
    if (!taken.has(index) && !leaseBook.isOut(point.id, index)) free.push(index);
  }
  return free;
}
