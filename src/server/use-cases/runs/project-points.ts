import type { Point } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { measuredPointsOf } from '../../repositories/points.ts';
import { projectToRead } from '../rights.ts';
import { shownPoint } from './shown-point.ts';

/** Every point of the project that has frames, for charts; `extra` is left empty, since nobody resumes from a chart. */
export async function projectPoints(
  context: Context,
  projectId: string,
  only: { codeId?: string; runId?: string },
): Promise<Point[]> {
  await projectToRead(context, projectId);
  return (await measuredPointsOf(context.db, projectId, only)).map((point) => shownPoint(point, []));
}
