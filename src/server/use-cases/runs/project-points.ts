import type { Point } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pointCount, pointsWanted } from '../../repositories/points.ts';
import { projectToRead } from '../rights.ts';
import { thinnedPoints } from './charted-points.ts';
import { shownPoint } from './shown-point.ts';

/** The points of the project that have frames, for charts: of very many those that a chart needs. `extra` is left empty,
 *  since nobody resumes from a chart. */
export async function projectPoints(
  context: Context,
  projectId: string,
  only: { codeId?: string; runId?: string },
): Promise<{ points: Point[]; omitted: number }> {
  await projectToRead(context, projectId);
  const { db } = context;
  const wanted = { projectId, ...only, measured: true };
  const thinned = await thinnedPoints(db, wanted, await pointCount(db, wanted));
  const points = thinned?.points ?? (await pointsWanted(db, wanted));
  return { points: points.map((point) => shownPoint(point, [])), omitted: thinned?.omitted ?? 0 };
}
