import type { Point, Stopping } from '@/api/runs.ts';
import type { Tally } from '@/core/simulation/tally.ts';

/** A point as the driver keeps it: what the server acknowledged, and which shards are out. */
export interface PointProgress {
  pointId: string;
  codeId: string;
  tally: Tally;
  done: boolean;
  /** Shards 0 … nextIndex − 1 are acknowledged, and those in `extra`. */
  nextIndex: number;
  extra: Set<number>;
  /** Handed out or computed, not yet acknowledged. */
  out: Set<number>;
}

export const progressOf = (point: Point): PointProgress => ({
  pointId: point.id,
  codeId: point.codeId,
  tally: point.tally,
  done: point.done,
  nextIndex: point.nextIndex,
  extra: new Set(point.extra),
  out: new Set(),
});

/** Shards that the cap on frames allows for a point. */
export const shardCap = (stopping: Stopping, framesPerShard: number) => Math.ceil(stopping.maxFrames / framesPerShard);

/** The next shard to compute: the first point in order that is not done, at its lowest index nobody has. */
export function nextShard(
  points: readonly PointProgress[],
  stopping: Stopping,
  framesPerShard: number,
): { point: PointProgress; index: number } | null {
  const cap = shardCap(stopping, framesPerShard);
  for (const point of points) {
    if (point.done) continue;
    let index = point.nextIndex;
    while (point.extra.has(index) || point.out.has(index)) index++;
    if (index < cap) return { point, index };
  }
  return null;
}

/** Marks a shard as acknowledged and closes the gap behind it. */
export function acknowledge(point: PointProgress, index: number): void {
  point.out.delete(index);
  if (index >= point.nextIndex) point.extra.add(index);
  while (point.extra.delete(point.nextIndex)) point.nextIndex++;
}

/** A run that counts a set number of frames has no errors to stop on. */
const errorsToStop = ({ frameErrors }: Stopping): number => frameErrors ?? Number.POSITIVE_INFINITY;

export const reachedStop = (tally: Tally, stopping: Stopping) =>
  tally.frameErrors >= errorsToStop(stopping) || tally.frames >= stopping.maxFrames;

/** Share of a point's work that is behind it: by errors or by frames, whichever is further. */
export function fractionDone(point: Pick<PointProgress, 'tally' | 'done'>, stopping: Stopping): number {
  if (point.done) return 1;
  return Math.min(
    1,
    Math.max(point.tally.frameErrors / errorsToStop(stopping), point.tally.frames / stopping.maxFrames),
  );
}

/** Frames a point is expected to need still; with no error seen yet, all that the cap allows. */
export function framesLeft(point: Pick<PointProgress, 'tally' | 'done'>, stopping: Stopping): number {
  if (point.done) return 0;
  const { frames, frameErrors } = point.tally;
  const toCap = Math.max(0, stopping.maxFrames - frames);
  if (frameErrors === 0) return toCap;
  return Math.min(toCap, (Math.max(0, errorsToStop(stopping) - frameErrors) * frames) / frameErrors);
}
