import { useMemo } from 'react';
import type { RateKind } from '@/client/curves/curve.ts';
import type { ChartCurve } from '../chart-curve.ts';
import { type ChartWindow, lastMeasured, type Requirement, wholeWindow } from './domain.ts';
import { chartFrame, type Frame, isNarrowWidth } from './frame.ts';
import { type CurveMarks, curveMarks, type Mark } from './marks.ts';
import type { Choice } from './walk.ts';

export interface PlacedCurve {
  chartCurve: ChartCurve;
  marks: CurveMarks;
}

/** All that the drawing needs, worked out from what is to be shown and the width there is. */
export interface ChartModel {
  kind: RateKind;
  window: ChartWindow;
  frame: Frame;
  placed: readonly PlacedCurve[];
  /** What stands at the end of each placed curve. */
  endTexts: readonly string[];
  requirement: Requirement | null;
  /** Beyond this crossover probability nothing was measured. */
  last: number | null;
  /** Code lengths whose uncoded lines are drawn. */
  lengths: readonly number[];
}

interface Inputs {
  curves: readonly ChartCurve[];
  kind: RateKind;
  hidden: ReadonlySet<string>;
  zoom: ChartWindow | null;
  requirement?: Requirement | null;
  planned?: readonly number[];
}

export function useChartModel({ curves, kind, hidden, zoom, planned, ...inputs }: Inputs, width: number): ChartModel {
  const shown = useMemo(() => curves.filter(({ curve }) => !hidden.has(curve.key)), [curves, hidden]);
  const requirement = inputs.requirement?.kind === kind ? inputs.requirement : null;
  const window = useMemo(
    () => zoom ?? wholeWindow({ curves: shown.map(({ curve }) => curve), kind, planned, requirement }),
    [zoom, shown, kind, planned, requirement],
  );
  return useMemo(() => {
    const endTexts = endLabelTexts(shown, isNarrowWidth(width));
    const frame = chartFrame(width, window, endLabelRooms(shown, endTexts, window));
    return {
      kind,
      window,
      frame,
      placed: shown.map((chartCurve) => ({ chartCurve, marks: curveMarks(chartCurve.curve, kind, frame, window) })),
      endTexts,
      requirement,
      last: lastMeasured(shown.map(({ curve }) => curve)),
      lengths: uncodedLengths(shown, kind),
    };
  }, [width, window, shown, kind, requirement]);
}

const MOST_NAMED_CURVES = 8;
const LONGEST_NAME = 34;

/** Names at the ends of curves; their letters, which the legend explains, where names would crowd the chart. */
function endLabelTexts(curves: readonly ChartCurve[], isNarrow: boolean): string[] {
  const hasRoom = !isNarrow && curves.length <= MOST_NAMED_CURVES;
  return curves.map(({ label, style }) => (hasRoom && label.length <= LONGEST_NAME ? label : style.letter));
}

/** Room that each end label wants, at the last point inside the window. */
function endLabelRooms(curves: readonly ChartCurve[], texts: readonly string[], window: ChartWindow) {
  return curves.flatMap(({ curve }, i) => {
    const last = curve.points.findLast((point) => point.p >= window.pMin && point.p <= window.pMax);
    return last ? [{ p: last.p, text: texts[i]! }] : [];
  });
}

const MOST_UNCODED_LINES = 4;

/** Code lengths to draw uncoded lines for; for bits one line serves all. */
function uncodedLengths(curves: readonly ChartCurve[], kind: RateKind): number[] {
  const lengths = [...new Set(curves.map(({ curve }) => curve.n))].sort((a, b) => b - a);
  return lengths.slice(0, kind === 'ber' ? 1 : MOST_UNCODED_LINES);
}

/** The chosen point where it stands, if it is still shown. */
export function findChoice(
  placed: readonly PlacedCurve[],
  choice: Choice | null,
): { chartCurve: ChartCurve; mark: Mark } | null {
  const home = choice && placed.find(({ chartCurve }) => chartCurve.curve.key === choice.curveKey);
  const mark = home?.marks.inside.find(({ point }) => point.pointId === choice?.pointId);
  return home && mark ? { chartCurve: home.chartCurve, mark } : null;
}
