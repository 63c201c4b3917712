import type { Point, Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pointsOfRun } from '../../repositories/points.ts';
import { extraIndicesOfRun } from '../../repositories/shards.ts';
import { thinnedPoints } from './charted-points.ts';
import { runToRead } from './run-access.ts';
import { shownPoint } from './shown-point.ts';

/** A run with its points' tallies and intervals; of very many points those that a chart needs. */
export async function getRun(context: Context, runId: string): Promise<{ run: Run; points: Point[]; omitted: number }> {
  const run = await runToRead(context, runId);
  const thinned = await thinnedPoints(context.db, { runId }, run.pointCount);
  if (thinned) {
    return { run, points: thinned.points.map((point) => shownPoint(point, [])), omitted: thinned.omitted };
  }
  const points = await pointsOfRun(context.db, runId);
  const extra = await extraIndicesOfRun(context.db, runId);
  return { run, omitted: 0, points: points.map((point) => shownPoint(point, extra.get(point.id) ?? [])) };
}
