import type { CurvePoint, RateKind } from '@/client/curves/curve.ts';
import { isThin } from '@/client/curves/curve.ts';
import { uncodedRate } from '@/client/curves/uncoded.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { CurveSwatch } from '../charts/CurveSwatch.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { Figure } from '../charts/Figure.tsx';
import { intervalText, parameterText, plainRate, rateText } from '../charts/rate-text.ts';
import { comparisonGrid, type GridRow, uncodedColumns } from './comparison-grid.ts';

interface Props {
  curves: readonly ChartCurve[];
  kind: RateKind;
}

/** Rows that are drawn; the file holds all. */
const MOST_ROWS = 300;

/** The overlaid curves as figures: a row a channel point, a column a curve, and the uncoded channel beside them. */
export function CompareTable({ curves, kind }: Props) {
  const rows = comparisonGrid(curves);
  const columns: Column<GridRow>[] = [
    { key: 'p', header: 'p', kind: 'number', cell: (row) => parameterText(row.p), sortBy: (row) => row.p },
    ...curves.map(
      (chartCurve, at): Column<GridRow> => ({
        key: chartCurve.curve.key,
        header: <Head chartCurve={chartCurve} />,
        kind: 'number',
        cell: (row) => <Cell point={row.cells[at] ?? null} kind={kind} />,
      }),
    ),
    ...uncodedColumns(curves, kind).map(
      (n): Column<GridRow> => ({
        key: `uncoded-${n}`,
        header: <span className="font-normal">uncoded{kind === 'fer' && <span className="block">n = {n}</span>}</span>,
        kind: 'number',
        cell: (row) => (
          <span className="text-quiet">
            <Figure text={plainRate(uncodedRate(kind, row.p, n))} />
          </span>
        ),
      }),
    ),
  ];
  return (
    <div className="grid gap-2">
      <DataTable
        caption={kind === 'fer' ? 'Frame error rates' : 'Bit error rates'}
        showCaption
        columns={columns}
        rows={rows.slice(0, MOST_ROWS)}
        rowKey={(row) => String(row.p)}
        empty="No points to compare."
      />
      <p className="flex flex-wrap items-baseline gap-x-4 text-quiet text-tiny">
        {curves.some(({ curve }) => !curve.at) && <Grade grade="sampled" method="Monte Carlo over the frames stated" />}
        {curves.some(({ curve }) => curve.at) && (
          <span className="inline-flex items-baseline gap-2">
            <Grade grade="bounded" method="from weight strata; the limits hold at every p at once" />
            strata: estimate and rigorous limits
          </span>
        )}
        <span>
          <span className="font-semibold text-thin">thin</span>: fewer than 100 frame errors.
        </span>
        <span>no point: not measured there; nothing is read off between points.</span>
        {rows.length > MOST_ROWS && <span>The first {MOST_ROWS} rows; the file has them all.</span>}
      </p>
    </div>
  );
}

function Head({ chartCurve }: { chartCurve: ChartCurve }) {
  return (
    <span className="inline-grid justify-items-end gap-1 whitespace-normal text-right">
      <CurveSwatch style={chartCurve.style} showLetter />
      <span className="max-w-44 min-w-28">{chartCurve.label}</span>
    </span>
  );
}

function Cell({ point, kind }: { point: CurvePoint | null; kind: RateKind }) {
  if (point === null) return <span className="whitespace-nowrap font-sans text-quiet">no point</span>;
  const rate = point[kind];
  const counts =
    point.grade === 'bounded'
      ? 'rigorous limits from weight strata'
      : `${counted(point.frameErrors, 'frame error')} in ${counted(point.frames, 'frame')}`;
  return (
    <span className="inline-grid whitespace-nowrap" title={counts}>
      <Figure text={rateText(rate)} />
      {rate.value !== null && (
        <span className="text-quiet text-tiny">
          <Figure text={intervalText(rate)} />
        </span>
      )}
      {isThin(point) && <span className="font-sans font-semibold text-thin text-tiny">thin</span>}
    </span>
  );
}
