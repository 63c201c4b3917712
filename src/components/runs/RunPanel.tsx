import { useState } from 'react';
import type { Point, Run } from '@/api/runs.ts';
import { usePace } from '@/client/use-pace.ts';
import type { DriverView, RunDriverHandle } from '@/client/use-run-driver.ts';
import { useRunPatch } from '@/client/use-run-patch.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { KernelNote } from './KernelNote.tsx';
import { DRIVER_WORD, PLACE, progressText, rateText, STATE_WORD, storedFraction, sumText } from './run-progress.ts';
import { StopDialog } from './StopDialog.tsx';

interface Props {
  run: Run;
  points: readonly Point[];
  driver: RunDriverHandle;
}

/** Progress and the controls, for those who may run. */
export function RunPanel({ run, points, driver }: Props) {
  const [asksToStop, setAsksToStop] = useState(false);
  const { status } = driver;
  const isOver = run.state === 'finished' || run.state === 'stopped' || status === 'finished' || status === 'stopped';
  const isAtWork = status === 'running' || status === 'pausing' || status === 'waiting-for-server';
  const word = headWord(run, status);
  const isElsewhere = status === 'idle' && run.place !== 'browser';
  const pace = usePace(run, points);
  const fraction = status === 'idle' ? storedFraction(run, points) : run.state === 'finished' ? 1 : driver.fractionDone;
  const timeLeftMs = isElsewhere ? pace.timeLeftMs : status === 'running' ? driver.timeLeftMs : null;
  return (
    <section className="grid gap-2 border border-rule bg-sheet px-4 py-3" aria-label="Progress">
      <p className="flex flex-wrap items-baseline gap-x-2" role="status">
        <span className="font-semibold">{word}</span>
        {isAtWork && <span className="text-quiet">in this browser, {counted(driver.workers, 'worker')}</span>}
        {isElsewhere && !isOver && <span className="text-quiet">{PLACE[run.place]}</span>}
      </p>
      <Progress
        label="Share of the run that is done"
        value={fraction}
        left={progressText(fraction, timeLeftMs)}
        right={isElsewhere ? rateText(pace.framesPerSecond) : paceText(driver)}
      />
      <p className="text-quiet text-tiny">{sumText(points)}</p>
      <KernelNote points={points} isWorkedOn={status !== 'idle'} />
      {status === 'waiting-for-server' && (
        <Notice kind="caution" word="Waiting for the server" live>
          {driver.message ?? 'It cannot write just now.'} Nothing acknowledged is lost; the run goes on by itself.
        </Notice>
      )}
      {status === 'failed' && (
        <Notice kind="fail" word="The run halted" live>
          {driver.message} What was acknowledged is kept.
        </Notice>
      )}
      {status !== 'waiting-for-server' && status !== 'failed' && driver.message && (
        <Notice kind="caution" word="Note" live>
          {driver.message}
        </Notice>
      )}
      {run.state === 'running' && status === 'idle' && !isElsewhere && (
        <p className="text-quiet text-tiny">
          This run was under way and is not being worked on from this tab. Go on here: every acknowledged shard is kept,
          and a shard computed twice counts once.
        </p>
      )}
      {!isOver && (
        <div className="flex flex-wrap gap-2" data-screen-only>
          {isElsewhere ? <RemoteButtons run={run} driver={driver} /> : <MainButton run={run} driver={driver} />}
          <Button kind="quiet" disabled={status === 'pausing'} onClick={() => setAsksToStop(true)}>
            Stop
          </Button>
        </div>
      )}
      <StopDialog
        open={asksToStop}
        onClose={() => setAsksToStop(false)}
        onStop={() => {
          setAsksToStop(false);
          driver.stop();
        }}
      />
    </section>
  );
}

/** Throughput now, or as it last was in this tab. */
function paceText({ status, framesPerSecond, lastFramesPerSecond = 0 }: DriverView): string {
  if (status === 'running') return rateText(framesPerSecond);
  return lastFramesPerSecond > 0 ? `was ${rateText(lastFramesPerSecond)}` : '';
}

/** The stored state, unless this page is at work on the run or the run was left under way. */
function headWord(run: Run, status: DriverView['status']): string {
  if (status !== 'idle') return DRIVER_WORD[status];
  return run.state === 'running' && run.place === 'browser' ? DRIVER_WORD.idle : STATE_WORD[run.state];
}

/** For a run that the server or the fleet works off; this browser may help. */
function RemoteButtons({ run, driver }: { run: Run; driver: RunDriverHandle }) {
  const { patch, isBusy } = useRunPatch(run.id);
  if (run.state === 'paused') {
    return (
      <Button kind="primary" busy={isBusy} onClick={() => void patch({ state: 'running' })}>
        Resume
      </Button>
    );
  }
  return (
    <>
      <Button busy={isBusy} onClick={() => void patch({ state: 'paused' })}>
        Pause
      </Button>
      <Button kind="quiet" onClick={driver.start}>
        Help from this browser
      </Button>
    </>
  );
}

function MainButton({ run, driver }: { run: Run; driver: RunDriverHandle }) {
  switch (driver.status) {
    case 'running':
    case 'waiting-for-server':
      return <Button onClick={driver.pause}>Pause</Button>;
    case 'pausing':
      return <Button busy>Pausing</Button>;
    case 'paused':
    case 'failed':
      return (
        <Button kind="primary" onClick={driver.resume}>
          {driver.status === 'failed' ? 'Try again' : 'Resume'}
        </Button>
      );
    default:
      return (
        <Button kind="primary" onClick={driver.start}>
          {run.state === 'running' ? 'Go on here' : run.state === 'paused' ? 'Resume' : 'Start'}
        </Button>
      );
  }
}
