import type { Point, Run } from '@/api/runs.ts';
import { usePace } from '@/client/use-pace.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { PLACE, progressText, rateText, STATE_WORD, storedFraction, sumText } from './run-progress.ts';

interface Props {
  run: Run;
  points: readonly Point[];
}

/** Progress for those who may read only: the same figures, live, and nothing to press. */
export function WatchPanel({ run, points }: Props) {
  const fraction = storedFraction(run, points);
  const { framesPerSecond, timeLeftMs } = usePace(run, points);
  return (
    <section className="grid gap-2 border border-rule bg-sheet px-4 py-3" aria-label="Progress">
      <p role="status">
        <span className="font-semibold">{STATE_WORD[run.state]}</span>
        {run.state === 'running' && <span className="text-quiet"> {PLACE[run.place]}</span>}
        <span className="text-quiet"> · you read this project; its engineers run</span>
      </p>
      <Progress
        label="Share of the run that is done"
        value={fraction}
        left={progressText(fraction, timeLeftMs)}
        right={rateText(framesPerSecond)}
      />
      <p className="text-quiet text-tiny">{sumText(points)}</p>
    </section>
  );
}
