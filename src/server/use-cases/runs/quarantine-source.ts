import type { Run } from '@/api/runs.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import { nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { workEvents } from '../../events/work-events.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { pointById, type StoredPoint, setRecomputed } from '../../repositories/points.ts';
import { agreedRechecks } from '../../repositories/rechecks.ts';
import { runById, updateRun } from '../../repositories/runs.ts';
import { shardSource } from '../../repositories/shards.ts';
import { markQuarantined, type Source, setShardsAside, sourceById } from '../../repositories/sources.ts';
import { tellRunOwner } from '../notices/tell-run-owner.ts';
import { fromTheStart, recountPoint } from './recount-point.ts';
import { authorOfRun } from './run-author.ts';

export interface Mismatch {
  run: Run;
  point: StoredPoint;
  index: number;
  stored: Tally;
  computed: Tally;
}

/** A source of which a shard was found wrong is believed nothing: every shard of it, in every run, leaves the count, its
 *  index is handed out anew, and the owners are told. @returns the runs that this changed. */
export async function quarantineSourceOf(trx: Database, mismatch: Mismatch): Promise<string[]> {
  const { point, index, stored, computed } = mismatch;
  const sourceId = await shardSource(trx, point.id, index);
  const source = sourceId === undefined ? undefined : await sourceById(trx, sourceId);
  if (!source) return [];
  const at = nowText();
  await markQuarantined(trx, source.id, at);
  const lost = new Map<string, number>();
  for (const pointId of await setShardsAside(trx, source.id, at)) {
    const affected = (await pointById(trx, pointId))!;
    const run = (await runById(trx, affected.runId))!;
    await recountPoint(trx, run, { ...affected, ...fromTheStart() });
    await setRecomputed(trx, pointId, await agreedRechecks(trx, pointId));
    lost.set(run.id, (lost.get(run.id) ?? 0) + 1);
  }
  for (const [runId, points] of lost) {
    const run = (await runById(trx, runId))!;
    await reopen(trx, run);
    const evidence = { sourceId: source.id, source: source.label, pointId: point.id, index, stored, computed };
    const event = { projectId: run.projectId, kind: 'source.quarantined', subject: runId, content: evidence };
    await recordEvent(trx, { id: await authorOfRun(trx, runId) }, event);
    await tellRunOwner(trx, run, 'quarantine', reasonText(source, mismatch, points));
  }
  workEvents.changed();
  return [...lost.keys()];
}

/** A run that was finished lacks shards again: those of the server and the fleet go on, others wait for their owner. */
async function reopen(trx: Database, run: Run): Promise<void> {
  if (run.state !== 'finished' || run.pointsDone === run.pointCount) return;
  await updateRun(trx, run.id, { state: run.place === 'browser' ? 'paused' : 'running', outcome: null });
}

const reasonText = ({ label }: Source, { index, stored, computed }: Mismatch, points: number): string =>
  `The server computed shard ${index} of ${label} again and found ${computed.frameErrors} frame errors where ` +
  `${stored.frameErrors} were handed in. All results of that source, at ${points} ${points === 1 ? 'point' : 'points'} ` +
  'of this run, were set aside and are computed anew.';
