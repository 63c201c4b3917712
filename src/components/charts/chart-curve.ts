import type { Curve } from '@/client/curves/curve.ts';
import { curveLabels } from '@/client/curves/curve-labels.ts';
import { type CurveStyle, curveStyle } from './palette.ts';

/** A curve with the name and the look it has everywhere on a page. */
export interface ChartCurve {
  curve: Curve;
  label: string;
  style: CurveStyle;
}

export function chartCurves(curves: readonly Curve[], runName?: (runId: string) => string | undefined): ChartCurve[] {
  const labels = curveLabels(curves, runName);
  return curves.map((curve, i) => ({ curve, label: labels[i]!, style: curveStyle(i) }));
}
