import { useState } from 'react';
import type { Point, Stopping } from '@/api/runs.ts';
import { curvePointOf } from '@/client/curves/curve.ts';
import { Button } from '@/components/ui/Button.tsx';
import { DataTable } from '@/components/ui/DataTable.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { ChartCurve } from '../charts/chart-curve.ts';
import { pointColumns } from './points-columns.tsx';

interface Props {
  points: readonly Point[];
  curves: readonly ChartCurve[];
  stopping: Stopping;
  seed: string;
  selectedId: string | null;
  onSelect: (pointId: string) => void;
}

/** Rows shown at first, and more at each asking. */
const ROWS_AT_ONCE = 100;

/** Every point with its counts, rates, intervals and how far it is. */
export function PointsTable({ points, curves, stopping, seed, selectedId, onSelect }: Props) {
  const [rowLimit, setRowLimit] = useState(ROWS_AT_ONCE);
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
