import type { Run } from '@/api/runs.ts';
import { STATE_WORD } from './run-progress.ts';

const LOOK: Record<Run['state'], string> = {
  ready: 'text-quiet',
  running: 'text-act',
  paused: 'text-thin',
  stopped: 'text-quiet',
  finished: 'text-pass',
};

/** The state as a word, with a bar of how many points are done while it is under way. */
export function RunState({ run }: { run: Pick<Run, 'state' | 'pointsDone' | 'pointCount'> }) {
  const showsBar = run.state === 'running' || run.state === 'paused';
  return (
    <span className="inline-grid gap-0.5">
      <span className={`font-semibold ${LOOK[run.state]}`}>{STATE_WORD[run.state]}</span>
      {showsBar && run.pointCount > 0 && (
        <span className="block h-1 w-20 bg-hair" aria-hidden="true">
          <span className="block h-full bg-act" style={{ width: `${(100 * run.pointsDone) / run.pointCount}%` }} />
        </span>
      )}
    </span>
  );
}
