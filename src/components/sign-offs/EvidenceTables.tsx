import { decoderText } from '@/client/curves/decoder-text.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { Enclosure } from '@/core/evidence.ts';
import { levelText, parameterText, scientific } from '../charts/rate-text.ts';
import { type MeasuredPoint, type MeasuredRow, pointText, type Snapshot, type StrataRow } from './snapshot.ts';

const within = ({ lower, upper }: Enclosure) =>
  lower === 0 ? `≤ ${scientific(upper, 2, 'up')}` : `${scientific(lower, 2, 'down')} to ${scientific(upper, 2, 'up')}`;

const MEASURED: Column<MeasuredRow>[] = [
  { key: 'what', header: 'channel, decoder', cell: (row) => pointText(row) },
  { key: 'run', header: 'run, seed', cell: ({ run }) => (run ? `${run.name}, “${run.seed}”` : 'removed') },
  { key: 'frames', header: 'frames', kind: 'number', cell: ({ tally }) => wholeNumber(tally.frames) },
  { key: 'errors', header: 'errors', kind: 'number', cell: ({ tally }) => wholeNumber(tally.frameErrors) },
  {
    key: 'fer',
    header: 'FER',
    kind: 'number',
    cell: ({ fer }) => (fer.value === null ? 'none seen' : scientific(fer.value)),
  },
  {
    key: 'limits',
    header: 'limits',
    cell: ({ fer, level, grade }) => (grade === 'computed' ? 'exact' : `${within(fer)} at ${levelText(level)}`),
  },
  { key: 'grade', header: 'grade', cell: ({ grade }) => <Grade grade={grade} /> },
];

const STRATA: Column<StrataRow>[] = [
  { key: 'what', header: 'run, decoder', cell: ({ run, decoder }) => `${run.name}, ${decoderText(decoder)}` },
  {
    key: 'proved',
    header: 'proved',
    cell: ({ radius }) => (radius ? `no failure up to ${radius.value} errors; ${radius.method}` : 'nothing'),
  },
  { key: 'weights', header: 'weights', cell: ({ strata }) => weightsText(strata) },
  {
    key: 'limits',
    header: 'FER',
    cell: ({ limits, level }) =>
      limits.length === 0
        ? 'no crossover probability was required'
        : limits.map(({ p, fer }) => (
            <span key={p} className="block">
              {within(fer)} at p = {parameterText(p)}, {levelText(level)}
            </span>
          )),
  },
  { key: 'grade', header: 'grade', cell: () => <Grade grade="bounded" /> },
];

function weightsText(strata: StrataRow['strata']): string {
  const known = strata.filter(({ grade }) => grade !== 'proved').map(({ weight }) => weight);
  return known.length === 0 ? 'none beyond' : `${known[0]} to ${known.at(-1)} tried or sampled`;
}

interface LabPoint extends MeasuredPoint {
  key: string;
  name: string;
  level: number;
}

const LAB: Column<LabPoint>[] = [
  { key: 'name', header: 'data', cell: ({ name }) => name },
  { key: 'p', header: 'p', kind: 'number', cell: ({ p }) => parameterText(p) },
  { key: 'frames', header: 'frames', kind: 'number', cell: ({ frames }) => wholeNumber(frames) },
  { key: 'errors', header: 'errors', kind: 'number', cell: ({ frameErrors }) => wholeNumber(frameErrors) },
  { key: 'limits', header: 'FER', cell: ({ interval, level }) => `${within(interval)} at ${levelText(level)}` },
  { key: 'grade', header: 'grade', cell: () => <Grade grade="sampled" /> },
];

/** Every measurement of a snapshot: this program's own points, weight strata, and data measured elsewhere. */
export function EvidenceTables({ snapshot }: { snapshot: Snapshot }) {
  const { measurements, strata = [], measuredData = [] } = snapshot;
  const lab = measuredData.flatMap(({ id, name, fileName, points, level }) =>
    points.map((point) => ({ ...point, key: `${id} ${point.p}`, name: `${name} (${fileName})`, level })),
  );
  return (
    <div className="grid min-w-0 gap-7">
      <DataTable
        caption="Measured points"
        showCaption
        columns={MEASURED}
        rows={measurements}
        rowKey={({ point }) => point}
        empty="Nothing was measured."
      />
      {strata.length > 0 && (
        <DataTable
          caption="Weight strata"
          showCaption
          columns={STRATA}
          rows={strata}
          rowKey={({ run, decoder }) => `${run.id} ${JSON.stringify(decoder)}`}
        />
      )}
      {lab.length > 0 && (
        <DataTable caption="Measured elsewhere" showCaption columns={LAB} rows={lab} rowKey={({ key }) => key} />
      )}
    </div>
  );
}
