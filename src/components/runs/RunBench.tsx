import { type ReactNode, useMemo } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Point, Run } from '@/api/runs.ts';
import { crossoverOf } from '@/client/curves/curve.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { csvText, pointRows } from '@/client/curves/points-csv.ts';
import { useApi } from '@/client/hooks.ts';
import { useStrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';
import { chartCurves } from '../charts/chart-curve.ts';
import { ErrorRateChart } from '../charts/error-rate-chart/ErrorRateChart.tsx';
import { INTERVAL_METHOD } from '../charts/interval-method.ts';
import { RequirementTable } from '../charts/RequirementTable.tsx';
import { levelText } from '../charts/rate-text.ts';
import { requirementOf } from '../charts/requirement.ts';
import { runsText } from '../charts/runs-text.ts';
import { useUrlParam } from '../charts/url-state.ts';
import { useChartAddress } from '../charts/use-chart-address.ts';
import { StrataBench } from '../strata/StrataBench.tsx';
import { Caution } from './Caution.tsx';
import { GoalBlock } from './GoalBlock.tsx';
import { PointDetail } from './PointDetail.tsx';
import { PointsTable } from './PointsTable.tsx';
import { RestOfRun } from './RestOfRun.tsx';
import { RunTitleBlock } from './RunTitleBlock.tsx';
import { SourceTables } from './SourceTables.tsx';
import { fileStem, saveFile } from './save-file.ts';

interface Props {
  projectId: string;
  run: Run;
  points: Point[];
  /** Points of the run that are neither in the chart nor given. */
  omitted: number;
  /** Whether the reader may state runs. */
  canRun: boolean;
  /** Progress, with or without controls. */
  panel: ReactNode;
}

/** A run under way or at rest: chart and table on the left, progress and particulars on the right. */
export function RunBench({ projectId, run, points, omitted, canRun, panel }: Props) {
  const evidence = useStrataEvidence(points);
  const curves = useMemo(
    () => chartCurves([...groupPoints(points), ...evidence.map(({ curve }) => curve)]),
    [points, evidence],
  );
  const planned = useMemo(() => points.flatMap((point) => crossoverOf(point) ?? []), [points]);
  const address = useChartAddress(curves);
  const [selectedId, setSelectedId] = useUrlParam('point');
  const { data } = useApi(endpoints.getRequirements, { params: { id: projectId } });
  const requirement = useMemo(
    () =>
      requirementOf(
        data?.requirements,
        address.kind,
        curves.map(({ curve }) => curve),
      ),
    [data, address.kind, curves],
  );
  const keepCsv = () =>
    saveFile(
      `${fileStem(run.name)}.csv`,
      'text/csv',
      csvText(
        pointRows(
          curves.map(({ curve }) => curve),
          () => run,
        ),
      ),
    );

  return (
    <div className="grid gap-x-7 gap-y-6 wide:grid-cols-[minmax(0,1fr)_20.5rem] wide:grid-rows-[auto_1fr_auto]">
      <div className="min-w-0">
        <h1>{run.name}</h1>
        <p className="mt-1 mb-3 text-quiet">{subtitle(curves.length, points, omitted)}</p>
        <ErrorRateChart
          {...address}
          title={`${address.kind === 'fer' ? 'Frame' : 'Bit'} error rate, ${run.name}`}
          curves={curves}
          planned={planned}
          requirement={requirement}
          intervalMethod={INTERVAL_METHOD[address.kind]}
          provenance={runsText([run])}
          onChoose={setSelectedId}
        />
      </div>
      <div className="grid min-w-0 content-start gap-5 wide:row-span-2">
        <GoalBlock run={run} />
        {panel}
        {canRun && <RestOfRun run={run} />}
        {requirement && <RequirementTable curves={curves} requirement={requirement} />}
        <RunTitleBlock run={run} points={points} />
        <Caution />
      </div>
      <PointDetail points={points} curves={curves} selectedId={selectedId} onSelect={setSelectedId} />
      {evidence.length > 0 && (
        <div className="min-w-0 wide:col-span-2">
          <StrataBench
            evidence={evidence}
            curves={curves}
            requirements={data?.requirements ?? null}
            run={run}
            projectId={projectId}
            canRun={canRun}
          />
        </div>
      )}
      <div className="min-w-0 wide:col-span-2">
        <PointsTable
          runId={run.id}
          points={points}
          omitted={omitted}
          curves={curves}
          stopping={run.stopping}
          seed={run.seed}
          selectedId={selectedId}
          onSelect={setSelectedId}
        />
        <div className="mt-3 flex flex-wrap gap-2" data-screen-only>
          <Button size="small" onClick={keepCsv}>
            Download CSV
          </Button>
          <ButtonLink kind="quiet" size="small" href={`${paths.compare(projectId)}?run=${run.id}`}>
            Compare these curves
          </ButtonLink>
        </div>
        <div className="mt-7">
          <SourceTables run={run} points={points} />
        </div>
      </div>
    </div>
  );
}

/** "Four curves, 22 points, every interval 99 %." in figures. */
function subtitle(curveCount: number, points: readonly Point[], omitted: number): string {
  const level = points[0]?.level;
  const intervals = level === undefined ? '' : `, every interval ${levelText(level)}`;
  const thinned =
    omitted > 0 ? ` Of them ${counted(points.length, 'is', 'are')} drawn: ends, extremes and limits.` : '';
  return `${counted(curveCount, 'curve')}, ${counted(points.length + omitted, 'point')}${intervals}.${thinned}`;
}
