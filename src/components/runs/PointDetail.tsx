import type { Point } from '@/api/runs.ts';
import { channelText } from '@/client/curves/channel-text.ts';
import { curveKey } from '@/client/curves/group-points.ts';
import { SelectField } from '@/components/ui/fields.tsx';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { HistogramWhenVisible } from '../charts/HistogramWhenVisible.tsx';
import { PointEstimators } from './PointEstimators.tsx';

interface Props {
  points: readonly Point[];
  curves: readonly ChartCurve[];
  selectedId: string | null;
  onSelect: (pointId: string) => void;
}

/** "p = 0.012", or the channel in words. */
const placeText = (point: Point): string =>
  (point.channel.kind === 'bsc' ? 'p = ' : '') + channelText(point.channel, String);

/** A list to choose from stays short; any other point is chosen in the table or on the chart. */
const MOST_OFFERED = 200;

function offered(points: readonly Point[], selected: Point): readonly Point[] {
  const first = points.slice(0, MOST_OFFERED);
  return first.includes(selected) ? first : [selected, ...first];
}

/** The estimates and iterations of one point, chosen here, in the table or on the chart. */
export function PointDetail({ points, curves, selectedId, onSelect }: Props) {
  const labels = new Map(curves.map(({ curve, label }) => [curve.key, label]));
  const selected = points.find((point) => point.id === selectedId) ?? points[0];
  if (!selected) return null;
  return (
    <section
      className="grid min-w-0 content-start gap-2"
      aria-label="Estimates and iterations of a point"
      data-screen-only
    >
      <h2>One point</h2>
      <SelectField
        label="Point"
        className="max-w-md"
        value={selected.id}
        onChange={(event) => onSelect(event.target.value)}
        choices={offered(points, selected).map((point) => ({
          value: point.id,
          label: `${labels.get(curveKey(point)) ?? point.codeLabel}, ${placeText(point)}`,
        }))}
      />
      {selected.tally.frames === 0 ? (
        <p className="text-quiet">No frames at this point yet.</p>
      ) : (
        <>
          <PointEstimators point={selected} />
          <HistogramWhenVisible histogram={selected.tally.iterationHistogram} />
        </>
      )}
    </section>
  );
}
