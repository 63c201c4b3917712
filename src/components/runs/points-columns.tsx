import type { Point, Stopping } from '@/api/runs.ts';
import { channelText } from '@/client/curves/channel-text.ts';
import { type CurvePoint, crossoverOf, type curvePointOf, isThin } from '@/client/curves/curve.ts';
import { curveKey } from '@/client/curves/group-points.ts';
import type { Column } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { CurveSwatch } from '../charts/CurveSwatch.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { RateWithLimits } from '../charts/RateWithLimits.tsx';
import { parameterText } from '../charts/rate-text.ts';

/** A point as stored, and as it stands on its curve once it has frames. */
export interface PointRow {
  point: Point;
  measured: ReturnType<typeof curvePointOf>;
}

interface Particulars {
  byKey: ReadonlyMap<string, ChartCurve>;
  stopping: Stopping;
  seed: string;
  selectedId: string | null;
  onSelect: (pointId: string) => void;
}

/** The columns of the table of points: which point, its counts and rates, how far it is and how it is known. */
export const pointColumns = (particulars: Particulars): Column<PointRow>[] => [
  ...namingColumns(particulars),
  ...MEASURED_COLUMNS,
  stateColumn(particulars),
];

const namingColumns = ({ byKey, selectedId, onSelect }: Particulars): Column<PointRow>[] => [
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
];

const stateColumn = ({ stopping, seed }: Particulars): Column<PointRow> => ({
  key: 'state',
  header: 'state, evidence',
  cell: ({ point, measured }) => (
    <span className="inline-grid whitespace-nowrap">
      {pointState(point, stopping)}
      {measured && <Evidence measured={measured} seed={seed} />}
    </span>
  ),
});

const count = (key: string, header: string, of: (point: Point) => number): Column<PointRow> => ({
  key,
  header,
  kind: 'number',
  cell: ({ point }) => wholeNumber(of(point)),
  sortBy: ({ point }) => of(point),
});

const MEASURED_COLUMNS: Column<PointRow>[] = [
  count('frames', 'frames', (point) => point.tally.frames),
  count('errors', 'frame errors', (point) => point.tally.frameErrors),
  {
    key: 'fer',
    header: 'FER',
    kind: 'number',
    cell: ({ measured }) => (measured ? <RateWithLimits rate={measured.fer} /> : '–'),
    sortBy: ({ measured }) => measured?.fer.value ?? measured?.fer.upper ?? 2,
  },
  {
    key: 'ber',
    header: 'BER',
    kind: 'number',
    cell: ({ measured }) => (measured ? <RateWithLimits rate={measured.ber} /> : '–'),
    sortBy: ({ measured }) => measured?.ber.value ?? measured?.ber.upper ?? 2,
  },
  count('undetected', 'undetected', (point) => point.tally.undetected),
  {
    key: 'iterations',
    header: 'iterations',
    kind: 'number',
    cell: ({ point }) => iterationsMean(point)?.toFixed(2) ?? '–',
    sortBy: ({ point }) => iterationsMean(point) ?? -1,
  },
];

const iterationsMean = ({ tally }: Point): number | null => (tally.frames > 0 ? tally.iterations / tally.frames : null);

const DONE_WORD: Record<NonNullable<Point['stopReason']>, string> = {
  errors: 'done',
  width: 'done, as narrow as asked',
  frames: 'done, at the cap on frames',
  pass: 'keeps the limit',
  fail: 'does not keep the limit',
  time: 'ended, time used up',
  failed: 'given up',
};

/** A parameter that may be 0, as of a channel without errors in its good state. */
const numberText = (value: number): string => (value === 0 ? '0' : parameterText(value));

/** "done at 100 errors", "done at the cap", "under way", "waiting". */
export function pointState(point: Pick<Point, 'done' | 'tally' | 'stopReason'>, { frameErrors }: Stopping): string {
  if (point.done) {
    const reached = frameErrors !== undefined && point.tally.frameErrors >= frameErrors ? 'errors' : 'frames';
    return DONE_WORD[point.stopReason ?? reached];
  }
  return point.tally.frames > 0 ? 'under way' : 'waiting';
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
