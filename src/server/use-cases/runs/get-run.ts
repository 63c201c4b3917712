import type { Point, Run } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pointsOfRun } from '../../repositories/points.ts';
import { extraIndicesOfRun } from '../../repositories/shards.ts';
import { runToRead } from './run-access.ts';
import { shownPoint } from './shown-point.ts';

/** A run with its points' tallies and intervals. */
export async function getRun(context: Context, runId: string): Promise<{ run: Run; points: Point[] }> {
  const run = await runToRead(context, runId);
  const points = await pointsOfRun(context.db, runId);
  const extra = await extraIndicesOfRun(context.db, runId);
  return { run, points: points.map((point) => shownPoint(point, extra.get(point.id) ?? [])) };
}
