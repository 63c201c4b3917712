import type { z } from 'zod';
import type { runEventSchema } from '@/api/runs.ts';

export type RunEvent = z.output<typeof runEventSchema>;

/** What is known of a run with what an event tells: points that changed in their places, new ones at the end. An event
 *  from before what is known, as a reconnected stream may repeat, changes nothing. */
export function mergeRunEvent(known: RunEvent, event: RunEvent): RunEvent {
  if (event.run.revision < known.run.revision) return known;
  if (event.points.length === 0) return { run: event.run, points: known.points };
  const changed = new Map(event.points.map((point) => [point.id, point]));
  const points = known.points.map((point) => {
    const now = changed.get(point.id);
    changed.delete(point.id);
    return now ?? point;
  });
  return { run: event.run, points: [...points, ...changed.values()] };
}
