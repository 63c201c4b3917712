import type { z } from 'zod';
import type { runEventSchema } from '@/api/runs.ts';

export type RunEvent = z.output<typeof runEventSchema>;
export type KnownRun = RunEvent & { omitted: number };

/** What is known of a run with what an event tells: points that changed in their places, new ones at the end, unless
 *  only some are known at all. An event from before what is known, as a reconnected stream may repeat, changes
 *  nothing. */
export function mergeRunEvent(known: KnownRun, event: RunEvent): KnownRun {
  if (event.run.revision < known.run.revision) return known;
  const { omitted } = known;
  if (event.points.length === 0) return { run: event.run, points: known.points, omitted };
  const changed = new Map(event.points.map((point) => [point.id, point]));
  const points = known.points.map((point) => {
    const now = changed.get(point.id);
    changed.delete(point.id);
    return now ?? point;
  });
  return { run: event.run, points: omitted > 0 ? points : [...points, ...changed.values()], omitted };
}
