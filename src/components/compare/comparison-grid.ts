import type { CurvePoint, RateKind } from '@/client/curves/curve.ts';
import { isThin, pointAt } from '@/client/curves/curve.ts';
import { uncodedRate } from '@/client/curves/uncoded.ts';
import { isRound } from '@/client/strata/round-crossovers.ts';
import type { ChartCurve } from '../charts/chart-curve.ts';

export interface GridRow {
  p: number;
  /** One a curve, in their order; null where the curve has no point. */
  cells: (CurvePoint | null)[];
}

/** Curves side by side: a row for each crossover probability at which any has a point, worst channel first. Of curves
 *  known at every p the round ones of their own have rows. */
export function comparisonGrid(curves: readonly ChartCurve[]): GridRow[] {
  const rows = new Map<number, GridRow>();
  curves.forEach(({ curve }, column) => {
    for (const point of curve.points) {
      if (curve.at && !isRound(point.p)) continue;
      let row = rows.get(point.p);
      if (row === undefined) {
        row = { p: point.p, cells: curves.map(() => null) };
        rows.set(point.p, row);
      }
      row.cells[column] = point;
    }
  });
  curves.forEach(({ curve }, column) => {
    if (curve.at) for (const row of rows.values()) row.cells[column] ??= pointAt(curve, row.p) ?? null;
  });
  return [...rows.values()].sort((a, b) => b.p - a.p);
}

/** Code lengths for which uncoded frames are given beside the curves; bits need one column only. */
export const uncodedColumns = (curves: readonly ChartCurve[], kind: RateKind): number[] => {
  const lengths = [...new Set(curves.map(({ curve }) => curve.n))].sort((a, b) => a - b);
  return kind === 'ber' ? lengths.slice(0, 1) : lengths;
};

/** The table as plain cells, for the clipboard: "7.4e-4", "< 3.0e-6 (thin)", "no point". */
export function gridText(curves: readonly ChartCurve[], kind: RateKind): string[][] {
  const lengths = uncodedColumns(curves, kind);
  const name = kind.toUpperCase();
  const heads = [
    'p',
    ...curves.map(({ label }) => `${name} ${label}`),
    ...lengths.map((n) => (kind === 'ber' ? 'BER uncoded' : `FER uncoded, n = ${n}`)),
  ];
  const rows = comparisonGrid(curves).map(({ p, cells }) => [
    String(p),
    ...cells.map((point) => (point ? cellText(point, kind) : 'no point')),
    ...lengths.map((n) => uncodedRate(kind, p, n).toPrecision(4)),
  ]);
  return [heads, ...rows];
}

function cellText(point: CurvePoint, kind: RateKind): string {
  const rate = point[kind];
  const figure = rate.value === null ? `< ${rate.upper.toExponential(1)}` : rate.value.toExponential(2);
  return isThin(point) ? `${figure} (thin)` : figure;
}
