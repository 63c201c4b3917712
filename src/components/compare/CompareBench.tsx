import { useMemo } from 'react';
import type { Measurement } from '@/api/measurements.ts';
import type { Requirements } from '@/api/projects.ts';
import type { Run } from '@/api/runs.ts';
import type { Curve } from '@/client/curves/curve.ts';
import { csvText, pointRows, tabbedText } from '@/client/curves/points-csv.ts';
import { Button } from '@/components/ui/Button.tsx';
import { chartCurves } from '../charts/chart-curve.ts';
import { ErrorRateChart } from '../charts/error-rate-chart/ErrorRateChart.tsx';
import { INTERVAL_METHOD } from '../charts/interval-method.ts';
import { RequirementTable } from '../charts/RequirementTable.tsx';
import { requirementOf } from '../charts/requirement.ts';
import { runsText } from '../charts/runs-text.ts';
import { useUrlParam } from '../charts/url-state.ts';
import { useChartAddress } from '../charts/use-chart-address.ts';
import { Caution } from '../runs/Caution.tsx';
import { saveFile } from '../runs/save-file.ts';
import { CompareTable } from './CompareTable.tsx';
import { CopyButton } from './CopyButton.tsx';
import { CurvePicker } from './CurvePicker.tsx';
import { gridText } from './comparison-grid.ts';
import { DifferenceTest } from './DifferenceTest.tsx';
import { selectedCurves, selectionText } from './selection.ts';

interface Props {
  runs: readonly Run[];
  /** Error rates measured elsewhere. */
  measurements: readonly Measurement[];
  curves: readonly Curve[];
  requirements: Requirements | null;
  addAddress: string | null;
  onRemove: ((measured: Measurement) => void) | null;
}

/** Chart, table and chooser of the comparison; what is chosen lives in the address. */
export function CompareBench({ runs, measurements, curves, requirements, addAddress, onRemove }: Props) {
  const [named, setNamed] = useUrlParam('curves');
  const [runId] = useUrlParam('run');
  const runById = useMemo(() => new Map(runs.map((run) => [run.id, run])), [runs]);
  const chosen = useMemo(() => {
    const nameOf = (id: string) => runById.get(id)?.name ?? measurements.find((measured) => measured.id === id)?.name;
    return chartCurves(selectedCurves(curves, runs, { curves: named, run: runId }), nameOf);
  }, [curves, runs, measurements, named, runId, runById]);
  const address = useChartAddress(chosen);
  const { kind } = address;
  const plain = useMemo(() => chosen.map(({ curve }) => curve), [chosen]);
  const requirement = useMemo(() => requirementOf(requirements, kind, plain), [requirements, kind, plain]);
  const keepCsv = () => saveFile('comparison.csv', 'text/csv', csvText(pointRows(plain, (id) => runById.get(id))));
  const title = `${kind === 'fer' ? 'Frame' : 'Bit'} error rates compared`;

  return (
    <div className="grid gap-x-7 gap-y-6 wide:grid-cols-[minmax(0,1fr)_20.5rem] ">
      <div className="min-w-0">
        <h1 className="mb-3">{title}</h1>
        <ErrorRateChart
          {...address}
          title={title}
          curves={chosen}
          requirement={requirement}
          intervalMethod={INTERVAL_METHOD[kind]}
          provenance={runsText(runs.filter(({ id }) => plain.some(({ runId }) => runId === id)))}
        />
      </div>
      <div className="grid min-w-0 content-start gap-5 ">
        <CurvePicker
          runs={runs}
          measurements={measurements}
          addAddress={addAddress}
          onRemove={onRemove}
          curves={curves}
          chosen={chosen}
          onChange={(keys) => setNamed(keys.length > 0 ? selectionText(keys) : 'none')}
        />
        {requirement && <RequirementTable curves={chosen} requirement={requirement} />}
        <Caution />
      </div>
      <div className="min-w-0 wide:col-span-2">
        <CompareTable curves={chosen} kind={kind} />
        <div className="mt-3 flex flex-wrap items-center gap-3" data-screen-only>
          <CopyButton label="Copy table" text={() => tabbedText(gridText(chosen, kind))} />
          <Button size="small" onClick={keepCsv}>
            Download CSV
          </Button>
        </div>
      </div>
      <div className="min-w-0 wide:col-span-2">
        <DifferenceTest curves={chosen} runs={runById} />
      </div>
    </div>
  );
}
