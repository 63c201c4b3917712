import { randomInt } from 'node:crypto';
import type { z } from 'zod';
import type { Run, shardReceiptSchema } from '@/api/runs.ts';
import { recheckShare } from '../../config.ts';
import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { workEvents } from '../../events/work-events.ts';
import { leaseBook } from '../../jobs/lease-book.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { pointsByIds, type StoredPoint } from '../../repositories/points.ts';
import { askRechecks, pointsWithoutRecheck } from '../../repositories/rechecks.ts';
import { updateRun } from '../../repositories/runs.ts';
import { forgetFailures, setAsideIndices } from '../../repositories/shard-failures.ts';
import { insertShards } from '../../repositories/shards.ts';
import type { Source } from '../../repositories/sources.ts';
import { endIfDone } from './end-if-done.ts';
import { fromTheStart, recountPoint } from './recount-point.ts';
import { refuseBadShards } from './refuse-bad-shards.ts';
import { type Shard, type SortedShards, sortShards } from './sort-shards.ts';
import { spendTime } from './spend-time.ts';

export type Receipt = z.output<typeof shardReceiptSchema>;

/** Stores computed shards in the caller's transaction and brings their points and the run up to date. A shard already
 *  there with the same tally counts as a duplicate; one that differs is a conflict, kept in the record of events, and
 *  the stored one stands until the server has computed it again. */
export async function storeShards(
  trx: Database,
  run: Run,
  shards: readonly Shard[],
  by: { userId: string; source: Source },
): Promise<Receipt> {
  const found = await pointsByIds(trx, run.id, [...new Set(shards.map((shard) => shard.pointId))]);
  const points = new Map(found.map((point) => [point.id, point]));
  refuseBadShards(shards, run, points);
  const sorted = await sortShards(trx, shards);
  refuseIfClosed(run, sorted.fresh.length);
  await insertShards(trx, sorted.fresh, { userId: by.userId, at: nowText(), sourceId: by.source.id });
  await recordConflicts(trx, run, by.userId, sorted);
  await askForRechecks(trx, by.source, sorted);
  for (const { pointId, index } of shards) leaseBook.release(pointId, index);
  if (sorted.fresh.length > 0) await advance(trx, run, points, sorted.fresh);
  return {
    accepted: sorted.fresh.length,
    duplicates: sorted.duplicates,
    conflicts: sorted.conflicts.map(({ posted: { pointId, index } }) => ({ pointId, index })),
  };
}

function refuseIfClosed(run: Run, freshCount: number): void {
  if (freshCount === 0 || (run.state !== 'stopped' && run.state !== 'finished')) return;
  throw new Refusal('run-closed', `The run is ${run.state} and takes no new shards; nothing of this batch was stored.`);
}

async function recordConflicts(trx: Database, run: Run, userId: string, { conflicts }: SortedShards): Promise<void> {
  for (const { posted, stored } of conflicts) {
    const content = { runId: run.id, index: posted.index, posted: posted.tally, stored };
    const event = { projectId: run.projectId, kind: 'shard.conflict', subject: posted.pointId, content };
    await recordEvent(trx, { id: userId }, event);
  }
}

/** What a browser, script or machine handed in is sampled, at random so that nobody can tell which, and at least one
 *  shard a point; of two that contradict each other the stored one is looked at in any case. */
async function askForRechecks(trx: Database, source: Source, { fresh, conflicts }: SortedShards): Promise<void> {
  const share = recheckShare();
  if (share === 0) return;
  const asked: Pick<Shard, 'pointId' | 'index'>[] = conflicts.map(({ posted }) => posted);
  if (source.kind !== 'server') {
    const bare = await pointsWithoutRecheck(trx, [...new Set(fresh.map(({ pointId }) => pointId))]);
    for (const pointId of bare) {
      const ofPoint = fresh.filter((shard) => shard.pointId === pointId);
      asked.push(ofPoint[randomInt(ofPoint.length)]!);
    }
    asked.push(...fresh.filter(() => randomInt(1_000_000) < share * 1_000_000));
  }
  if (asked.length === 0) return;
  await askRechecks(trx, asked);
  workEvents.changed();
}

/** Brings points, and then the run, up to date with their new shards. */
async function advance(
  trx: Database,
  run: Run,
  points: ReadonlyMap<string, StoredPoint>,
  fresh: readonly Shard[],
): Promise<void> {
  let isPointDone = false;
  for (const pointId of new Set(fresh.map((shard) => shard.pointId))) {
    const point = points.get(pointId)!;
    if (point.setAside > 0) await takeBack(trx, point, fresh);
    if (point.done) continue;
    isPointDone = (await recountPoint(trx, run, point)).done || isPointDone;
  }
  const isTimeOver = await spendTime(trx, run);
  if ((isPointDone || isTimeOver) && (await endIfDone(trx, run))) return;
  if (run.state === 'ready') await updateRun(trx, run.id, { state: 'running' });
}

/** Shards set aside that have come after all count again, from the first of them on. */
async function takeBack(trx: Database, point: StoredPoint, fresh: readonly Shard[]): Promise<void> {
  const aside = new Set(await setAsideIndices(trx, point.id));
  for (const { pointId, index } of fresh) {
    if (pointId !== point.id || !aside.has(index)) continue;
    await forgetFailures(trx, pointId, index);
    Object.assign(point, fromTheStart(), { setAside: point.setAside - 1 });
  }
}
