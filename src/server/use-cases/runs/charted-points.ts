import { downsample } from '@/core/statistics/downsample.ts';
import type { Database } from '../../db/database.ts';
import {
  type PointOutline,
  type PointsWanted,
  pointOutlines,
  pointsWithIds,
  type StoredPoint,
} from '../../repositories/points.ts';

/** Points that a page can be given as they are. */
export const mostPointsGiven = 2000;
/** Marks that may remain of a bucket: first, last, highest, lowest, and the two of bounds. */
const marksABucket = 6;

/** The points that a chart of `count` of them needs: of each stretch of a curve those at its ends, the highest and the lowest,
 *  and of those without errors the highest and the lowest limit. Null where there are few enough to be given whole. */
export async function thinnedPoints(
  db: Database,
  wanted: PointsWanted,
  count: number,
): Promise<{ points: StoredPoint[]; omitted: number } | null> {
  if (count <= mostPointsGiven) return null;
  const ids = idsToChart(await pointOutlines(db, wanted), mostPointsGiven);
  const points = await pointsWithIds(db, ids);
  return { points, omitted: count - points.length };
}

/** Which of the points stay, at most so many when no curve has fewer marks than a bucket. */
export function idsToChart(outlines: readonly PointOutline[], most: number): string[] {
  const curves = new Map<string, PointOutline[]>();
  for (const outline of outlines) {
    const curve = curves.get(outline.curve);
    if (curve) curve.push(outline);
    else curves.set(outline.curve, [outline]);
  }
  const buckets = Math.max(1, Math.floor(most / curves.size / marksABucket));
  return [...curves.values()].flatMap((curve) => thinned(curve, buckets));
}

function thinned(curve: readonly PointOutline[], buckets: number): string[] {
  const marks = curve.map(markOf).sort((a, b) => a.x - b.x);
  const span = marks.at(-1)!.x - marks[0]!.x;
  return downsample(marks, span > 0 ? span / buckets : 1, marksABucket).map(({ id }) => id);
}

/** Rates as the chart has them: logarithms, the upper limit where no frame failed, downwards as on a screen. */
function markOf({ id, x, frames, frameErrors }: PointOutline) {
  const isBound = frameErrors === 0;
  const rate = isBound ? 3 / Math.max(1, frames) : frameErrors / frames;
  return { id, x: Math.log(Math.max(x ?? 1, 1e-15)), y: -Math.log(rate), isBound };
}
