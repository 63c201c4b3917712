import type { NewRun, Point, Run, RunState } from '@/api/runs.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { workEvents } from '../../events/work-events.ts';
import { newId } from '../../ids.ts';
import { badFields } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codeById, codeLengths, matrixOf } from '../../repositories/codes.ts';
import { insertRun } from '../../repositories/runs.ts';
import { projectToWrite } from '../rights.ts';
import { getRun } from './get-run.ts';
import { nextCurvePoints } from './plan-curve.ts';
import { firstStage } from './plan-limit.ts';
import { codesNamed, refuseBadRun } from './refuse-bad-run.ts';
import { addPoints, type PlannedPoint } from './replan.ts';

/** States a run: its points wait for shards. */
export async function createRun(
  context: Context,
  projectId: string,
  input: NewRun,
): Promise<Run & { points: Point[] }> {
  await projectToWrite(context, projectId);
  const { db, caller } = context;
  const id = newId();
  refuseBadRun(input, await codeLengths(db, projectId, codesNamed(input)));
  const { goal, points } = await plannedRun(context, input);
  // The server and the fleet begin by themselves; a browser by its first shard.
  const state: RunState = input.place === 'browser' ? 'ready' : 'running';
  await inTransaction(db, async (trx) => {
    // A code may have gone while the run was planned.
    refuseBadRun(input, await codeLengths(trx, projectId, codesNamed(input)));
    const { name, seed, framesPerShard, stopping, place } = input;
    const row = { id, projectId, name, seed, framesPerShard, stopping, place, goal: goal ?? null, state };
    await insertRun(trx, { ...row, isDemo: false, createdBy: caller.id, createdAt: nowText() });
    await addPoints(trx, id, points, 0);
    const content = { name, seed, points: points.length };
    await recordEvent(trx, caller, { projectId, kind: 'run.stated', subject: id, content });
  });
  workEvents.changed();
  const stored = await getRun(context, id);
  return { ...stored.run, points: stored.points };
}

/** The points stated, or those that the goal begins with. */
export async function plannedRun(
  { db }: Pick<Context, 'db'>,
  input: NewRun,
): Promise<{ goal: NewRun['goal']; points: PlannedPoint[] }> {
  const { goal, points } = input;
  if (!goal) return { goal, points };
  if (goal.kind === 'curve') {
    const next = nextCurvePoints(input, goal, []);
    return { goal, points: 'points' in next ? next.points : [] };
  }
  const code = await codeById(db, goal.codeId);
  const H = await matrixOf(db, goal.codeId);
  if (!code || !H) throw badFields({ 'goal.codeId': 'the id of a code of this project, with parity checks' });
  const first = await firstStage(goal, { H, n: code.n, k: code.k }, input);
  return { goal: { ...goal, radius: first.radius }, points: first.points };
}
