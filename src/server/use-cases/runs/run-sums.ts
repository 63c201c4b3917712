import type { Run } from '@/api/runs.ts';

const plural = (count: number, noun: string): string => `${count} ${noun}${count === 1 ? '' : 's'}`;

/** "12 of 12 points, 412 frame errors in 1284000 frames." */
export const runSums = (run: Pick<Run, 'pointCount' | 'pointsDone' | 'frames' | 'frameErrors'>): string =>
  `${run.pointsDone} of ${plural(run.pointCount, 'point')} done, ${plural(run.frameErrors, 'frame error')} in ` +
  `${plural(run.frames, 'frame')}.`;
