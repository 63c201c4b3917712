import type { Run } from '@/api/runs.ts';
import type { Database } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { insertPoints, type NewPointRow, pointsOfRun } from '../../repositories/points.ts';
import { updateRun } from '../../repositories/runs.ts';
import { nextCurvePoints } from './plan-curve.ts';
import { nextStage } from './plan-limit.ts';

/** A point as a planner states it. */
export type PlannedPoint = Pick<NewPointRow, 'codeId' | 'channel' | 'decoder' | 'plan'>;

/** Adds the points that a run's goal needs next, by what has been measured; when it needs none, keeps what it came to. */
export async function replan(trx: Database, run: Run): Promise<void> {
  const points = await pointsOfRun(trx, run.id);
  const { goal } = run;
  if (!goal) return;
  const next = goal.kind === 'curve' ? nextCurvePoints(run, goal, points) : nextStage(run, goal, points);
  if ('outcome' in next) {
    if (next.outcome) await updateRun(trx, run.id, { outcome: next.outcome });
    return;
  }
  await addPoints(trx, run.id, next.points, points.length);
}

export async function addPoints(
  trx: Database,
  runId: string,
  points: readonly PlannedPoint[],
  firstPosition: number,
): Promise<void> {
  await insertPoints(
    trx,
    points.map((point, i) => ({ ...point, id: newId(), runId, position: firstPosition + i })),
  );
}
