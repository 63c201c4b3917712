import { isDeepStrictEqual } from 'node:util';
import type { Goal, Outcome, Run } from '@/api/runs.ts';
import { nextSweepPoint } from '@/core/simulation/sweep-planning.ts';
import type { StoredPoint } from '../../repositories/points.ts';
import type { PlannedPoint } from './replan.ts';

type CurveGoal = Extract<Goal, { kind: 'curve' }>;

/** The next point of each curve that may still gain by one. */
export function nextCurvePoints(
  { stopping }: Pick<Run, 'stopping'>,
  goal: CurveGoal,
  points: readonly StoredPoint[],
): { points: PlannedPoint[] } | { outcome: Outcome | null } {
  const added: PlannedPoint[] = [];
  for (const { codeId, decoder } of goal.curves) {
    const ofCurve = points.filter((point) => point.codeId === codeId && isDeepStrictEqual(point.decoder, decoder));
    const swept = ofCurve.map(({ channel, tally: { frames, frameErrors }, done }) => {
      return { p: channel.kind === 'bsc' ? channel.p : 0, frames, frameErrors, done };
    });
    const p = nextSweepPoint(swept, goal, stopping);
    if (p !== null) added.push({ codeId, channel: { kind: 'bsc', p }, decoder });
  }
  if (added.length > 0) return { points: added };
  if (points.some((point) => !point.done)) return { outcome: null };
  const text = `${goal.curves.length} ${goal.curves.length === 1 ? 'curve' : 'curves'} in ${points.length} points.`;
  return { outcome: { verdict: 'complete', text } };
}
