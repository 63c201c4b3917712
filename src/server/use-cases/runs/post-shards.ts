import type { z } from 'zod';
import type { Run, shardBatchSchema, shardReceiptSchema } from '@/api/runs.ts';
import { type Context, nowText } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { runEvents } from '../../events/run-events.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { openPointCount, pointsByIds, type StoredPoint } from '../../repositories/points.ts';
import { runById, updateRun } from '../../repositories/runs.ts';
import { insertShards } from '../../repositories/shards.ts';
import { tellRunOwner } from '../notices/tell-run-owner.ts';
import { advancePoint } from './advance-point.ts';
import { refuseBadShards } from './refuse-bad-shards.ts';
import { runToWrite } from './run-access.ts';
import { runSums } from './run-sums.ts';
import { type Shard, type SortedShards, sortShards } from './sort-shards.ts';

type Receipt = z.output<typeof shardReceiptSchema>;

/** Takes in computed shards: all of a batch in one transaction, answered once it is committed. A shard already there
 *  with the same tally counts as a duplicate; one that differs is a conflict, kept in the record of events, and the
 *  stored one stands. */
export async function postShards(
  context: Context,
  runId: string,
  { shards }: z.output<typeof shardBatchSchema>,
): Promise<Receipt> {
  await runToWrite(context, runId);
  const receipt = await inTransaction(context.db, (trx) => store({ ...context, db: trx }, runId, shards));
  if (receipt.accepted > 0) runEvents.changed(runId);
  return receipt;
}

async function store(context: Context, runId: string, shards: readonly Shard[]): Promise<Receipt> {
  const { db, caller } = context;
  const run = (await runById(db, runId))!;
  const found = await pointsByIds(db, runId, [...new Set(shards.map((shard) => shard.pointId))]);
  const points = new Map(found.map((point) => [point.id, point]));
  refuseBadShards(shards, run, points);
  const sorted = await sortShards(db, shards);
  refuseIfClosed(run, sorted.fresh.length);
  await insertShards(db, sorted.fresh, { userId: caller.id, at: nowText() });
  await recordConflicts(context, run, sorted);
  if (sorted.fresh.length > 0) await advance(db, run, points, sorted.fresh);
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

async function recordConflicts({ db, caller }: Context, run: Run, { conflicts }: SortedShards): Promise<void> {
  for (const { posted, stored } of conflicts) {
    const content = { index: posted.index, posted: posted.tally, stored };
    const event = { projectId: run.projectId, kind: 'shard.conflict', subject: posted.pointId, content };
    await recordEvent(db, caller, event);
  }
}

/** Brings points, and then the run, up to date with their new shards. */
async function advance(
  db: Database,
  run: Run,
  points: ReadonlyMap<string, StoredPoint>,
  fresh: readonly Shard[],
): Promise<void> {
  for (const pointId of new Set(fresh.map((shard) => shard.pointId))) {
    const tallies = fresh.filter((shard) => shard.pointId === pointId).map((shard) => shard.tally);
    await advancePoint(db, points.get(pointId)!, tallies, run.stopping);
  }
  if ((await openPointCount(db, run.id)) === 0) await finish(db, run.id);
  else if (run.state === 'ready') await updateRun(db, run.id, { state: 'running' });
}

async function finish(db: Database, runId: string): Promise<void> {
  await updateRun(db, runId, { state: 'finished' });
  const run = (await runById(db, runId))!;
  await tellRunOwner(db, run, 'run-finished', runSums(run));
}
