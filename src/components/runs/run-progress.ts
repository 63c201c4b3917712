import type { Point, Run } from '@/api/runs.ts';
import type { DriverView } from '@/client/run-driver.ts';
import { fractionDone } from '@/client/run-plan.ts';
import { counted, duration, scientific, wholeNumber } from '@/components/ui/numbers.ts';

/** How far a run is, from what the server holds: the share that someone who only watches can see. */
export function storedFraction(run: Run, points: readonly Point[]): number {
  if (run.state === 'finished') return 1;
  if (points.length === 0) return 0;
  return points.reduce((sum, point) => sum + fractionDone(point, run.stopping), 0) / points.length;
}

/** "8.1 M frames/s", "940 frames/s". */
export function rateText(framesPerSecond: number): string {
  if (framesPerSecond <= 0) return '';
  if (framesPerSecond < 10) return `${framesPerSecond.toFixed(1)} frames/s`;
  if (framesPerSecond < 10_000) return `${wholeNumber(Math.round(framesPerSecond))} frames/s`;
  const [size, unit] = framesPerSecond < 1e6 ? [1e3, 'k'] : [1e6, 'M'];
  return `${scientific(framesPerSecond / size, 3)} ${unit} frames/s`;
}

/** "62 %", rounded down so that 100 % is said only at the end. */
export const percentText = (fraction: number): string => `${Math.floor(fraction * 100 + 1e-9)}\u202f%`;

/** "62 %, 1 min 40 s left". */
export function progressText(fraction: number, timeLeftMs: number | null): string {
  const left = timeLeftMs === null || fraction >= 1 ? '' : `, ${duration(timeLeftMs)} left`;
  return percentText(fraction) + left;
}

/** "412 frame errors in 1 284 000 frames, 3 of 12 points done". */
export function sumText(points: readonly Point[]): string {
  const sum = (of: (point: Point) => number) => points.reduce((total, point) => total + of(point), 0);
  const errors = counted(
    sum((point) => point.tally.frameErrors),
    'frame error',
  );
  const frames = counted(
    sum((point) => point.tally.frames),
    'frame',
  );
  const done = points.filter((point) => point.done).length;
  return `${errors} in ${frames}, ${done} of ${counted(points.length, 'point')} done`;
}

/** What the driver is doing, in a word or two. */
export const DRIVER_WORD: Record<DriverView['status'], string> = {
  idle: 'Not running here',
  running: 'Running',
  pausing: 'Pausing',
  paused: 'Paused',
  'waiting-for-server': 'Waiting for the server',
  finished: 'Finished',
  stopped: 'Stopped',
  failed: 'Failed',
};

/** What the stored state says to someone who only watches. */
export const STATE_WORD: Record<Run['state'], string> = {
  ready: 'Not started',
  running: 'Running',
  paused: 'Paused',
  stopped: 'Stopped',
  finished: 'Finished',
};

export const PLACE: Record<Run['place'], string> = {
  browser: 'in the browser',
  server: 'on the server',
  fleet: 'on the fleet',
};
