import type { z } from 'zod';
import type { failedShardsSchema, Run } from '@/api/runs.ts';
import { type Context, nowText } from '../../context.ts';
import { type Database, inTransaction } from '../../db/database.ts';
import { runEvents } from '../../events/run-events.ts';
import { leaseBook } from '../../jobs/lease-book.ts';
import { badFields } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { pointById, pointsByIds } from '../../repositories/points.ts';
import { runById } from '../../repositories/runs.ts';
import { countFailure } from '../../repositories/shard-failures.ts';
import type { Source } from '../../repositories/sources.ts';
import { endIfDone } from './end-if-done.ts';
import { recountPoint, shardCap } from './recount-point.ts';
import { runToWrite } from './run-access.ts';
import { sourceOfCaller } from './source-of-caller.ts';

export interface FailedShard {
  pointId: string;
  index: number;
  message: string;
}

/** Takes a tab's or script's word that shards could not be computed. */
export async function failShards(
  context: Context,
  runId: string,
  { failures, source: named }: z.output<typeof failedShardsSchema>,
): Promise<{ setAside: number }> {
  const run = await runToWrite(context, runId);
  const points = new Map(
    (
      await pointsByIds(
        context.db,
        runId,
        failures.map(({ pointId }) => pointId),
      )
    ).map((point) => [point.id, point]),
  );
  const fields: Record<string, string> = {};
  failures.forEach(({ pointId, index }, i) => {
    const point = points.get(pointId);
    if (!point) fields[`failures.${i}.pointId`] = 'the id of a point of this run';
    else if (index >= shardCap(run, point)) fields[`failures.${i}.index`] = `from 0 to ${shardCap(run, point) - 1}`;
  });
  if (Object.keys(fields).length > 0) throw badFields(fields);
  const setAside = await inTransaction(context.db, async (trx) => {
    const source = await sourceOfCaller({ ...context, db: trx }, named);
    return noteFailures(trx, run.id, failures, { userId: context.caller.id, source });
  });
  runEvents.changed(runId);
  return { setAside };
}

/** Counts failures; the third of a shard sets it aside, and its point goes on without it.
 *  @returns how many were set aside. */
export async function noteFailures(
  trx: Database,
  runId: string,
  failures: readonly FailedShard[],
  by: { userId: string; source: Source },
): Promise<number> {
  let setAside = 0;
  for (const { pointId, index, message } of failures) {
    leaseBook.release(pointId, index);
    const isLast = await countFailure(trx, { pointId, index, message, sourceId: by.source.id, at: nowText() });
    if (!isLast) continue;
    setAside++;
    const run = (await runById(trx, runId))!;
    await giveUp(trx, run, { pointId, index, message }, by.userId);
  }
  return setAside;
}

async function giveUp(trx: Database, run: Run, { pointId, index, message }: FailedShard, userId: string) {
  const point = await pointById(trx, pointId);
  if (!point) return;
  const content = { runId: run.id, index, message };
  await recordEvent(
    trx,
    { id: userId },
    { projectId: run.projectId, kind: 'shard.set-aside', subject: pointId, content },
  );
  const { done } = await recountPoint(trx, run, { ...point, setAside: point.setAside + 1 });
  if (done && (run.state === 'running' || run.state === 'ready')) await endIfDone(trx, run);
}
