import { area, line } from 'd3-shape';
import type { Curve, CurvePoint, RateKind } from '@/client/curves/curve.ts';
import { isThin } from '@/client/curves/curve.ts';
import { downsample } from '@/core/statistics/downsample.ts';
import type { ChartWindow } from './domain.ts';
import type { Frame } from './frame.ts';

/** A point placed on the drawing. */
export interface Mark {
  point: CurvePoint;
  x: number;
  y: number;
  /** No error seen: y is the upper limit, and the mark points down from it. */
  isBound: boolean;
  /** Fewer frame errors than make firm evidence. */
  isThin: boolean;
  /** Ends of the interval; null for bounds. */
  whisker: { low: number; high: number } | null;
}

export interface CurveMarks {
  curve: Curve;
  /** Thinned out to what can be seen. */
  marks: readonly Mark[];
  /** Those inside the window: what can be pointed at. */
  inside: readonly Mark[];
  /** Path through the measured points; bounds are not joined, as no value is known there. */
  path: string;
  /** Between the limits, of a curve known at every p; empty for measured points, which have whiskers. */
  band: string;
  /** The last mark inside the window, where the label goes. */
  end: Mark | null;
}

const BUCKET_PX = 7;

export function curveMarks(curve: Curve, kind: RateKind, frame: Frame, window: ChartWindow): CurveMarks {
  const placed = curve.points.map((point) => placeMark(point, kind, frame));
  const marks = downsample(placed, BUCKET_PX);
  const path = line<Mark>(
    (mark) => mark.x,
    (mark) => mark.y,
  )(marks.filter((mark) => !mark.isBound));
  const inside = (mark: Mark) =>
    mark.point.p >= window.pMin && mark.point.p <= window.pMax && mark.y >= frame.top && mark.y <= frame.bottom;
  const seen = marks.filter(inside);
  const end = seen.findLast((mark) => !mark.isBound) ?? null;
  const band = curve.at ? bandPath(placed, frame) : '';
  return { curve, marks, inside: seen, path: path ?? '', band, end: labelAnchor(end, seen.at(-1) ?? null) };
}

function bandPath(placed: readonly Mark[], frame: Frame): string {
  const path = area<Mark>()
    .x((mark) => mark.x)
    .y0((mark) => mark.whisker?.low ?? frame.bottom + 10)
    .y1((mark) => mark.whisker?.high ?? mark.y);
  return path(placed) ?? '';
}

/** The label stands at the last measured mark, or at the last bound when there are only bounds after it. */
const labelAnchor = (measured: Mark | null, last: Mark | null): Mark | null =>
  last !== null && (measured === null || last.x - measured.x > 40) ? last : measured;

function placeMark(point: CurvePoint, kind: RateKind, frame: Frame): Mark {
  const rate = point[kind];
  const isBound = rate.value === null;
  // A lower limit of 0 has no place on a logarithmic axis: the whisker then runs out of the plot.
  const low = rate.lower > 0 ? frame.y(rate.lower) : frame.bottom + 10;
  return {
    point,
    x: frame.x(point.p),
    y: frame.y(rate.value ?? rate.upper),
    isBound,
    isThin: isThin(point),
    whisker: isBound ? null : { low, high: frame.y(rate.upper) },
  };
}

/** The mark nearest to a place, within `reachPx`; among all curves given. */
export function nearestMark(
  curves: readonly CurveMarks[],
  x: number,
  y: number,
  reachPx: number,
): { curve: Curve; mark: Mark } | null {
  let best: { curve: Curve; mark: Mark } | null = null;
  let bestDistance = reachPx;
  for (const { curve, inside } of curves)
    for (const mark of inside) {
      const distance = Math.hypot(mark.x - x, mark.y - y);
      if (distance < bestDistance) {
        bestDistance = distance;
        best = { curve, mark };
      }
    }
  return best;
}
