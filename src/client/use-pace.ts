import { useRef } from 'react';
import type { Point, Run } from '@/api/runs.ts';
import { framesLeft } from './run-plan.ts';

const windowMs = 15_000;

export interface Pace {
  framesPerSecond: number;
  timeLeftMs: number | null;
}

/** How fast a run gets on that others work on, by what the server has told of it lately. */
export function usePace(run: Run, points: readonly Point[]): Pace {
  const seen = useRef<{ at: number; frames: number }[]>([]);
  const frames = points.reduce((sum, point) => sum + point.tally.frames, 0);
  if (run.state !== 'running') seen.current = [];
  else if (seen.current.at(-1)?.frames !== frames) {
    const now = performance.now();
    seen.current = [...seen.current.filter(({ at }) => now - at < windowMs), { at: now, frames }];
  }
  return paceOf(
    seen.current,
    points.reduce((sum, point) => sum + framesLeft(point, run.stopping), 0),
  );
}

/** From at least three sightings, of which the first may have been anywhere between two results. */
export function paceOf(seen: readonly { at: number; frames: number }[], left: number): Pace {
  const [first, last] = [seen[0], seen.at(-1)];
  if (!first || !last || seen.length < 3 || last.at === first.at) return { framesPerSecond: 0, timeLeftMs: null };
  const framesPerSecond = (1000 * (last.frames - first.frames)) / (last.at - first.at);
  return { framesPerSecond, timeLeftMs: framesPerSecond > 0 ? (1000 * left) / framesPerSecond : null };
}
