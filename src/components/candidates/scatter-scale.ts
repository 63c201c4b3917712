import { type ScaleLinear, type ScaleLogarithmic, scaleLinear, scaleLog } from 'd3-scale';

export interface Place {
  n: number;
  rate: number;
}

export interface ScatterScale {
  width: number;
  height: number;
  x: ScaleLogarithmic<number, number>;
  y: ScaleLinear<number, number>;
}

export const margin = { top: 12, right: 16, bottom: 40, left: 52 };

/** Length by its logarithm, rate from a little below the least up to 1. */
export function scatterScale(places: readonly Place[], width: number, height: number): ScatterScale {
  let [low, high, least] = [Number.POSITIVE_INFINITY, 1, 0.98];
  for (const { n, rate } of places) {
    low = Math.min(low, n);
    high = Math.max(high, n);
    least = Math.min(least, rate);
  }
  const x = scaleLog()
    .domain([Math.max(1, Math.min(low, high) / 1.05), high * 1.05])
    .range([margin.left, width - margin.right]);
  const y = scaleLinear()
    .domain([Math.max(0, least - 0.02), 1])
    .range([height - margin.bottom, margin.top]);
  return { width, height, x, y };
}

type Corner = readonly [x: number, y: number];
/** A shorter drag is a press that slipped. */
const leastDragPx = 8;

/** The window that two corners of a drag stand for, as the filter writes it; null for a drag too short to mean one. */
export function windowBetween({ x, y }: ScatterScale, from: Corner, to: Corner): { n: string; rate: string } | null {
  const [left, right] = ordered(from[0], to[0]);
  const [top, bottom] = ordered(from[1], to[1]);
  if (right - left < leastDragPx || bottom - top < leastDragPx) return null;
  const [n0, n1] = [Math.max(1, Math.floor(x.invert(left))), Math.ceil(x.invert(right))];
  const [r0, r1] = [Math.max(0, y.invert(bottom)), Math.min(1, y.invert(top))];
  return { n: `${n0}..${n1}`, rate: `${r0.toFixed(3)}..${r1.toFixed(3)}` };
}

const ordered = (a: number, b: number): [number, number] => (a < b ? [a, b] : [b, a]);
