import type { Point, Stopping } from '@/api/runs.ts';
import { crossoverOf, curvePointOf, isThin } from '@/client/curves/curve.ts';
import { curveKey } from '@/client/curves/group-points.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { CurveSwatch } from '../charts/CurveSwatch.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { Figure } from '../charts/Figure.tsx';
import { intervalText, parameterText, rateText } from '../charts/rate-text.ts';

interface Props {
  points: readonly Point[];
  curves: readonly ChartCurve[];
  stopping: Stopping;
  seed: string;
  selectedId: string | null;
  onSelect: (pointId: string) => void;
}

/** Rows shown at once; the file has them all. */
const MOST_ROWS = 300;

/** Every point with its counts, rates, intervals and how far it is. */
export function PointsTable({ points, curves, stopping, seed, selectedId, onSelect }: Props) {
  const byKey = new Map(curves.map((chartCurve) => [chartCurve.curve.key, chartCurve]));
  const rows = points.slice(0, MOST_ROWS).map((point) => ({ point, measured: curvePointOf(point) }));
  const columns: Column<Row>[] = [
    {
      key: 'curve',
      header: 'curve',
      cell: ({ point }) => <CurveName chartCurve={byKey.get(curveKey(point))} fallback={point.codeLabel} />,
      sortBy: ({ point }) => byKey.get(curveKey(point))?.label ?? '',
    },
    {
      key: 'p',
      header: 'p',
      kind: 'number',
      cell: ({ point }) => (
        <button
          type="button"
          className="link font-mono"
          aria-pressed={point.id === selectedId}
          title="Show the iterations of this point"
          onClick={() => onSelect(point.id)}
        >
          {parameterText(crossoverOf(point) ?? 0)}
        </button>
      ),
      sortBy: ({ point }) => crossoverOf(point) ?? 0,
    },
    count('frames', 'frames', (point) => point.tally.frames),
    count('errors', 'frame errors', (point) => point.tally.frameErrors),
    {
      key: 'fer',
      header: 'FER',
      kind: 'number',
      cell: ({ measured }) => (measured ? <Figure text={rateText(measured.fer)} /> : '–'),
      sortBy: ({ measured }) => measured?.fer.value ?? measured?.fer.upper ?? 2,
    },
    {
      key: 'interval',
      header: 'interval',
      kind: 'number',
      cell: ({ measured }) => (measured ? <Figure text={intervalText(measured.fer)} /> : '–'),
    },
    {
      key: 'ber',
      header: 'BER',
      kind: 'number',
      cell: ({ measured }) => (measured ? <Figure text={rateText(measured.ber)} /> : '–'),
      sortBy: ({ measured }) => measured?.ber.value ?? measured?.ber.upper ?? 2,
    },
    count('undetected', 'undetected', (point) => point.tally.undetected),
    {
      key: 'iterations',
      header: 'iterations',
      kind: 'number',
      cell: ({ measured }) => (measured ? measured.iterationsMean.toFixed(2) : '–'),
      sortBy: ({ measured }) => measured?.iterationsMean ?? -1,
    },
    {
      key: 'state',
      header: 'state',
      cell: ({ point }) => <span className="whitespace-nowrap">{pointState(point, stopping)}</span>,
    },
    {
      key: 'evidence',
      header: 'evidence',
      cell: ({ point, measured }) =>
        measured && (
          <span className="inline-flex items-baseline gap-3">
            <Grade grade="sampled" method={`${wholeNumber(point.tally.frames)} frames, seed ${seed}`} />
            {isThin(measured) && <span className="font-semibold text-thin text-tiny">thin</span>}
          </span>
        ),
    },
  ];
  return (
    <div className="grid gap-2 text-tiny">
      <DataTable
        caption="Points"
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ point }) => point.id}
        selected={({ point }) => point.id === selectedId}
      />
      {points.length > MOST_ROWS && (
        <p className="text-quiet">
          The first {MOST_ROWS} of {wholeNumber(points.length)} points; the file has them all.
        </p>
      )}
    </div>
  );
}

interface Row {
  point: Point;
  measured: ReturnType<typeof curvePointOf>;
}

const count = (key: string, header: string, of: (point: Point) => number): Column<Row> => ({
  key,
  header,
  kind: 'number',
  cell: ({ point }) => wholeNumber(of(point)),
  sortBy: ({ point }) => of(point),
});

/** "done at 100 errors", "done at the cap", "under way", "waiting". */
export function pointState(point: Pick<Point, 'done' | 'tally'>, stopping: Stopping): string {
  if (point.done) return point.tally.frameErrors >= stopping.frameErrors ? 'done' : 'done, at the cap on frames';
  return point.tally.frames > 0 ? 'under way' : 'waiting';
}

function CurveName({ chartCurve, fallback }: { chartCurve: ChartCurve | undefined; fallback: string }) {
  if (!chartCurve) return fallback;
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      <CurveSwatch style={chartCurve.style} />
      {chartCurve.label}
    </span>
  );
}
