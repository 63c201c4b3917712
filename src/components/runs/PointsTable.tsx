import { useState } from 'react';
import type { Point, Stopping } from '@/api/runs.ts';
import { curvePointOf } from '@/client/curves/curve.ts';
import { usePagedPoints } from '@/client/use-paged-points.ts';
import { Button } from '@/components/ui/Button.tsx';
import { DataTable } from '@/components/ui/DataTable.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { pointColumns } from './points-columns.tsx';

interface Props {
  runId: string;
  points: readonly Point[];
  /** Points of the run that were not given; the table then fetches its rows page by page. */
  omitted: number;
  curves: readonly ChartCurve[];
  stopping: Stopping;
  seed: string;
  selectedId: string | null;
  onSelect: (pointId: string) => void;
}

/** Rows shown at first, and more at each asking. */
const ROWS_AT_ONCE = 100;

/** Every point with its counts, rates, intervals and how far it is. */
export function PointsTable({ runId, points: given, omitted, curves, stopping, seed, selectedId, onSelect }: Props) {
  const [rowLimit, setRowLimit] = useState(ROWS_AT_ONCE);
  const paged = usePagedPoints(runId, omitted > 0, rowLimit);
  const points = omitted > 0 ? paged.points : given;
  const all = given.length + omitted;
  const byKey = new Map(curves.map((chartCurve) => [chartCurve.curve.key, chartCurve]));
  const rows = points.slice(0, rowLimit).map((point) => ({ point, measured: curvePointOf(point) }));
  const columns = pointColumns({ byKey, stopping, seed, selectedId, onSelect });
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
      {all > rowLimit && (
        <p className="flex flex-wrap items-center gap-3 text-quiet">
          {paged.failure ?? `The first ${wholeNumber(rows.length)} of ${wholeNumber(all)} points.`}
          <Button kind="quiet" size="small" busy={paged.isBusy} onClick={() => setRowLimit(rowLimit + ROWS_AT_ONCE)}>
            Show more
          </Button>
        </p>
      )}
    </div>
  );
}
