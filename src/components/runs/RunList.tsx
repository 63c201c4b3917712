import { endpoints } from '@/api/endpoints.ts';
import type { Run } from '@/api/runs.ts';
import { useApi } from '@/client/hooks.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';
import { RunState } from './RunState.tsx';
import { dateText } from './RunTitleBlock.tsx';

interface Props {
  projectId: string;
  canRun: boolean;
}

const PAGE = 200;

/** The project's runs, newest first. */
export function RunList({ projectId, canRun }: Props) {
  const { data, error, mutate } = useApi(endpoints.listRuns, { params: { id: projectId }, query: { limit: PAGE } });
  if (!data) {
    if (!error) return <p className="text-quiet">The runs are being fetched.</p>;
    return (
      <Notice
        kind="fail"
        word="The runs could not be fetched"
        live
        action={<Button onClick={() => mutate()}>Try again</Button>}
      >
        {error.message}
      </Notice>
    );
  }
  if (data.runs.length === 0) return <NoRuns projectId={projectId} canRun={canRun} />;
  return (
    <>
      <DataTable caption="Runs, newest first" columns={columns(projectId)} rows={data.runs} rowKey={(run) => run.id} />
      {data.next && <p className="mt-2 text-quiet text-tiny">The newest {PAGE} runs are listed.</p>}
    </>
  );
}

function NoRuns({ projectId, canRun }: Props) {
  const action = canRun && (
    <ButtonLink kind="primary" href={paths.newRun(projectId)}>
      State a run
    </ButtonLink>
  );
  return (
    <EmptyState title="No runs yet" action={action}>
      A run measures the error rates of kept codes over a sweep of the channel, with intervals, from a stored seed.
    </EmptyState>
  );
}

const columns = (projectId: string): Column<Run>[] => [
  {
    key: 'name',
    header: 'run',
    cell: (run) => (
      <a className="link inline-block min-w-44 font-semibold" href={paths.run(projectId, run.id)}>
        {run.name}
      </a>
    ),
    sortBy: (run) => run.name,
  },
  { key: 'state', header: 'state', cell: (run) => <RunState run={run} />, sortBy: (run) => run.state },
  number(
    'points',
    'points done',
    (run) => run.pointsDone,
    (run) => `${run.pointsDone} of ${run.pointCount}`,
  ),
  number('frames', 'frames', (run) => run.frames),
  number('errors', 'frame errors', (run) => run.frameErrors),
  {
    key: 'seed',
    header: 'seed',
    cell: (run) => <span className="font-mono text-tiny">{run.seed}</span>,
  },
  {
    key: 'stated',
    header: 'stated',
    cell: (run) => (
      <span className="whitespace-nowrap">
        {dateText(run.createdAt)} <span className="text-quiet">by {run.createdBy}</span>
      </span>
    ),
    sortBy: (run) => run.createdAt,
  },
];

function number(
  key: string,
  header: string,
  of: (run: Run) => number,
  text: (run: Run) => string = (run) => wholeNumber(of(run)),
): Column<Run> {
  return {
    key,
    header,
    kind: 'number',
    cell: (run) => <span className="whitespace-nowrap">{text(run)}</span>,
    sortBy: of,
  };
}
