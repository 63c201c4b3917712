import type { Point } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { pageOf, pageRequest } from '../../repositories/paging.ts';
import { pointsOfRunPage } from '../../repositories/points.ts';
import { runToRead } from './run-access.ts';
import { shownPoint } from './shown-point.ts';

/** A page of a run's points in their order; `extra` is left empty, since nobody resumes from a list. */
export async function listRunPoints(
  context: Context,
  runId: string,
  query: { after?: string; limit?: number },
): Promise<{ points: Point[]; next?: string }> {
  await runToRead(context, runId);
  const request = pageRequest(query);
  const { items, next } = pageOf(await pointsOfRunPage(context.db, runId, request), request);
  return { points: items.map((point) => shownPoint(point, [])), ...(next && { next }) };
}
