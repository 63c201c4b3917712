import { useState } from 'react';
import type { Point, Stopping } from '@/api/runs.ts';
import { channelText } from '@/client/curves/channel-text.ts';
import { type CurvePoint, crossoverOf, curvePointOf, type Estimate, isThin } from '@/client/curves/curve.ts';
import { curveKey } from '@/client/curves/group-points.ts';
import { Button } from '@/components/ui/Button.tsx';
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

/** A parameter that may be 0, as of a channel without errors in its good state. */
const numberText = (value: number): string => (value === 0 ? '0' : parameterText(value));

/** Rows shown at first, and more at each asking. */
const ROWS_AT_ONCE = 100;

/** Every point with its counts, rates, intervals and how far it is. */
export function PointsTable({ points, curves, stopping, seed, selectedId, onSelect }: Props) {
  const [rowLimit, setRowLimit] = useState(ROWS_AT_ONCE);
  const byKey = new Map(curves.map((chartCurve) => [chartCurve.curve.key, chartCurve]));
  const rows = points.slice(0, rowLimit).map((point) => ({ point, measured: curvePointOf(point) }));
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
          {channelText(point.channel, numberText)}
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
      cell: ({ measured }) => (measured ? <RateCell rate={measured.fer} /> : '–'),
      sortBy: ({ measured }) => measured?.fer.value ?? measured?.fer.upper ?? 2,
    },
    {
      key: 'ber',
      header: 'BER',
      kind: 'number',
      cell: ({ measured }) => (measured ? <RateCell rate={measured.ber} /> : '–'),
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
      header: 'state, evidence',
      cell: ({ point, measured }) => (
        <span className="inline-grid whitespace-nowrap">
          {pointState(point, stopping)}
          {measured && <Evidence measured={measured} seed={seed} />}
        </span>
      ),
    },
  ];
  return (
    <div className="grid gap-2 text-tiny print:text-[7.5pt]">
      <DataTable
        caption="Points"
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ point }) => point.id}
        selected={({ point }) => point.id === selectedId}
      />
      {points.length > rowLimit && (
        <p className="flex flex-wrap items-center gap-3 text-quiet">
          The first {rowLimit} of {wholeNumber(points.length)} points.
          <Button kind="quiet" size="small" onClick={() => setRowLimit(rowLimit + ROWS_AT_ONCE)}>
            Show more
          </Button>
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

function RateCell({ rate }: { rate: Estimate }) {
  return (
    <span className="inline-grid">
      <Figure text={rateText(rate)} />
      {rate.value !== null && (
        <span className="text-quiet">
          <Figure text={intervalText(rate)} />
        </span>
      )}
    </span>
  );
}

function Evidence({ measured, seed }: { measured: CurvePoint; seed: string }) {
  return (
    <span className="inline-flex items-baseline gap-3">
      <Grade grade="sampled" method={`${wholeNumber(measured.frames)} frames, seed ${seed}`} />
      {isThin(measured) && <span className="font-semibold text-thin">thin</span>}
    </span>
  );
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
