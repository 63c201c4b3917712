import { endpoints } from '@/api/endpoints.ts';
import type { Point, Run } from '@/api/runs.ts';
import { useApi, useRunEvents } from '@/client/hooks.ts';
import { useRunDriver } from '@/client/use-run-driver.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { RunBench } from './RunBench.tsx';
import { RunPanel } from './RunPanel.tsx';
import { percentText, storedFraction } from './run-progress.ts';
import { useDocumentTitle } from './use-document-title.ts';
import { useProgressIcon } from './use-progress-icon.ts';
import { WatchPanel } from './WatchPanel.tsx';

interface Props {
  projectId: string;
  runId: string;
  /** Whether the reader's role may run; the server checks it again at every step. */
  canRun: boolean;
}

/** The page of a run: fetched, then followed by the server's word. */
export function RunPage({ projectId, runId, canRun }: Props) {
  const { data, error, mutate } = useApi(endpoints.getRun, { params: { id: runId } });
  useRunEvents(runId);
  if (!data) {
    if (!error) return <p className="text-quiet">The run is being fetched.</p>;
    return (
      <Notice
        kind="fail"
        word="The run could not be fetched"
        live
        action={<Button onClick={() => mutate()}>Try again</Button>}
      >
        {error.message}
      </Notice>
    );
  }
  const Bench = canRun ? DrivenRun : WatchedRun;
  return <Bench projectId={projectId} run={data.run} points={data.points} omitted={data.omitted} />;
}

interface BenchProps {
  projectId: string;
  run: Run;
  points: Point[];
  /** Points of the run that were not given, being more than a page can show at once. */
  omitted: number;
}

function DrivenRun({ projectId, run, points, omitted }: BenchProps) {
  const driver = useRunDriver(run, points);
  const isAtWork = driver.status === 'running' || driver.status === 'pausing';
  useDocumentTitle(
    driver.status === 'waiting-for-server'
      ? 'waiting'
      : isAtWork
        ? percentText(driver.fractionDone)
        : titleText(storedShare(run, points)),
  );
  useProgressIcon(isAtWork ? driver.fractionDone : storedShare(run, points));
  const panel = <RunPanel run={run} points={points} driver={driver} />;
  return <RunBench projectId={projectId} run={run} points={points} omitted={omitted} canRun panel={panel} />;
}

function WatchedRun({ projectId, run, points, omitted }: BenchProps) {
  const share = storedShare(run, points);
  useDocumentTitle(titleText(share));
  useProgressIcon(share);
  return (
    <RunBench
      projectId={projectId}
      run={run}
      points={points}
      omitted={omitted}
      canRun={false}
      panel={<WatchPanel run={run} points={points} />}
    />
  );
}

/** Of a run that others work on, as its title and icon show it. */
const storedShare = (run: Run, points: readonly Point[]): number | null =>
  run.state === 'running' ? storedFraction(run, points) : null;

const titleText = (share: number | null): string | null => (share === null ? null : percentText(share));
