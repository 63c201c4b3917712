import type { NewRun, Point, Run, RunState } from '@/api/runs.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { workEvents } from '../../events/work-events.ts';
import { newId } from '../../ids.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeLengths } from '../../repositories/codes.ts';
import { insertPoints } from '../../repositories/points.ts';
import { insertRun } from '../../repositories/runs.ts';
import { projectToWrite } from '../rights.ts';
import { getRun } from './get-run.ts';
import { refuseBadRun } from './refuse-bad-run.ts';

/** States a run: its points wait for shards. */
export async function createRun(
  context: Context,
  projectId: string,
  input: NewRun,
): Promise<Run & { points: Point[] }> {
  await projectToWrite(context, projectId);
  const { db, caller } = context;
  const id = newId();
  const { points, ...run } = input;
  // The server and the fleet begin by themselves; a browser by its first shard.
  const state: RunState = input.place === 'browser' ? 'ready' : 'running';
  await inTransaction(db, async (trx) => {
    refuseBadRun(input, await codeLengths(trx, projectId, [...new Set(points.map((point) => point.codeId))]));
    const row = { ...run, id, projectId, isDemo: false, state };
    await insertRun(trx, { ...row, createdBy: caller.id, createdAt: nowText() });
    await insertPoints(
      trx,
      points.map((point, position) => ({ ...point, id: newId(), runId: id, position })),
    );
    const content = { name: run.name, seed: run.seed, points: points.length };
    await recordEvent(trx, caller, { projectId, kind: 'run.stated', subject: id, content });
  });
  workEvents.changed();
  const stored = await getRun(context, id);
  return { ...stored.run, points: stored.points };
}
