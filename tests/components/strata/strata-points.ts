import type { Point } from '@/api/runs.ts';
import { examplePoint } from '../example-points.ts';

/** A weight of PG(2,16) with so many failures of 10 000 frames. */
export function stratumPoint(weight: number, frameErrors: number, change: Partial<Point> = {}): Point {
  const point = examplePoint({ id: `w${weight}`, frames: 10_000, frameErrors, done: true });
  return { ...point, channel: { kind: 'stratum', weight }, ...change };
}

/** Weights 9 to 24, failing more the heavier they are. */
export const strataPoints = (): Point[] =>
  Array.from({ length: 16 }, (_, i) => stratumPoint(9 + i, Math.min(10_000, Math.floor(4 ** (i - 2)))));
