import type { Curve, RateKind } from '@/client/curves/curve.ts';

/** What the chart shows: crossover probabilities fall to the right, rates fall downward. */
export interface ChartWindow {
  pMax: number;
  pMin: number;
  top: number;
  bottom: number;
}

export interface Requirement {
  kind: RateKind;
  /** The rate to be met. */
  target: number;
  /** At this crossover probability; null when the requirements name none. */
  p: number | null;
  /** Said on the chart: "required: FER ≤ 10⁻³ at p = 0.012". */
  label: string;
  /** Where room is short: "FER ≤ 10⁻³". */
  shortLabel: string;
}

interface Shown {
  curves: readonly Curve[];
  kind: RateKind;
  /** Crossover probabilities that are to be measured, so that the axis stands still while points come in. */
  planned?: readonly number[];
  requirement?: Requirement | null;
}

/** A target further than this below the lowest measured rate does not stretch the chart; it is told in words. */
const TARGET_REACH_DECADES = 4;
const LEAST_DECADES = 2;

/** The window that holds everything measured, the requirement where it is near, and room to the right of the last
 *  point for end labels and for saying that nothing was measured there. */
export function wholeWindow({ curves, kind, planned = [], requirement = null }: Shown): ChartWindow {
  let pMax = 0;
  let pMin = Infinity;
  let lowest = 1;
  const include = (p: number) => {
    pMax = Math.max(pMax, p);
    pMin = Math.min(pMin, p);
  };
  for (const curve of curves)
    for (const point of curve.points) {
      include(point.p);
      const rate = point[kind];
      // A lower limit far under its value, as with one error seen, may leave the chart at the bottom; the arrow that
      // hangs from an upper limit may not.
      lowest = Math.min(lowest, rate.value === null ? rate.upper / 3 : Math.max(rate.lower, rate.value / 5));
    }
  for (const p of planned) include(p);
  if (requirement && isInReach(requirement.target, lowest)) {
    lowest = Math.min(lowest, requirement.target * 0.5);
    if (requirement.p !== null) include(requirement.p);
  }
  if (pMax === 0) return { pMax: 0.06, pMin: 0.004, top: 1, bottom: 1e-5 };
  const span = Math.max(Math.log(pMax / pMin), Math.log(1.6));
  const spare = span - Math.log(pMax / pMin);
  const decades = Math.max(LEAST_DECADES, Math.ceil(-Math.log10(lowest) - 1e-9));
  return {
    pMax: Math.min(0.5, pMax * Math.exp(spare / 2 + 0.05 * span)),
    pMin: pMin * Math.exp(-(spare / 2 + 0.14 * span)),
    top: 1,
    // As the literal has it: 10 ** -4 is not 1e-4.
    bottom: Number(`1e-${decades}`),
  };
}

const isInReach = (target: number, lowest: number): boolean => Math.log10(lowest / target) <= TARGET_REACH_DECADES;

/** The lowest crossover probability at which a shown curve has a point; beyond it nothing was measured. */
export function lastMeasured(curves: readonly Curve[]): number | null {
  const last = Math.min(...curves.map((curve) => curve.points.at(-1)?.p ?? Infinity));
  return Number.isFinite(last) ? last : null;
}

const LEAST_RATIO = 1.02;
const LEAST_P = 1e-12;
const LEAST_RATE = 1e-300;

/** A window made by a drag or a key, kept within what the axes can show; null when nothing sensible is left. */
export function tidyWindow(window: ChartWindow): ChartWindow | null {
  const pMax = Math.min(0.5, window.pMax);
  const pMin = Math.max(LEAST_P, window.pMin);
  const top = Math.min(1, window.top);
  const bottom = Math.max(LEAST_RATE, window.bottom);
  return pMax / pMin >= LEAST_RATIO && top / bottom >= LEAST_RATIO ? { pMax, pMin, top, bottom } : null;
}

/** Magnifies about a place on the chart (fractions of the axes from left and top); factors below 1 widen. */
export function magnify(window: ChartWindow, factor: number, at = { x: 0.5, y: 0.5 }): ChartWindow | null {
  const axis = (from: number, to: number, share: number): [number, number] => {
    const middle = Math.log(from) + share * Math.log(to / from);
    const length = Math.log(to / from) / factor;
    return [Math.exp(middle - share * length), Math.exp(middle + (1 - share) * length)];
  };
  const [pMax, pMin] = axis(window.pMax, window.pMin, at.x);
  const [top, bottom] = axis(window.top, window.bottom, at.y);
  return tidyWindow({ pMax, pMin, top, bottom });
}

/** A window as it stands in an address: "0.03_0.008_0.1_1e-6". */
export const windowText = ({ pMax, pMin, top, bottom }: ChartWindow): string =>
  [pMax, pMin, top, bottom].map((x) => String(Number(x.toPrecision(4)))).join('_');

/** Reads it back; anything else is no window. */
export function parseWindow(text: string | null): ChartWindow | null {
  const numbers = (text ?? '').split('_').map(Number);
  if (numbers.length !== 4 || numbers.some((x) => !(x > 0))) return null;
  const [pMax, pMin, top, bottom] = numbers as [number, number, number, number];
  return tidyWindow({ pMax, pMin, top, bottom });
}
