import { framesToPlan, guessRate } from './planning.ts';
import type { StoppingRule } from './stopping.ts';

/** A curve to be measured between two channel points. */
export interface SweepGoal {
  from: number;
  to: number;
  /** Most points. */
  points: number;
}

export interface SweptPoint {
  p: number;
  frames: number;
  frameErrors: number;
  done: boolean;
}

/** Fewer errors than this and a point does not say where the curve goes. */
const fewErrors = 10;
/** A step goes down by about a decade of the rate, and not by more than half of p or less than a twentieth. */
const decade = 10;
const steepest = 0.5;
const gentlest = 0.95;
/** Below this many expected errors at the cap, a point further down would only say that none was seen. */
const leastExpected = 1;

/** The next channel point of a curve: first the worse end, where errors are plentiful; then down the waterfall, a decade
 *  a step, as long as the frames allowed can be expected to show errors; then between the neighbours whose rates are
 *  furthest apart. Null when there is nothing worth adding, or a point is still under way. */
export function nextSweepPoint(points: readonly SweptPoint[], goal: SweepGoal, rule: StoppingRule): number | null {
  const [low, high] = goal.from < goal.to ? [goal.from, goal.to] : [goal.to, goal.from];
  if (points.length === 0) return high;
  if (points.length >= goal.points || points.some((point) => !point.done)) return null;
  const sorted = [...points].sort((a, b) => a.p - b.p);
  return stepDown(sorted, low, rule) ?? betweenNeighbours(sorted);
}

const rateOf = ({ frames, frameErrors }: SweptPoint): number => Math.max(frameErrors, 0.5) / Math.max(frames, 1);

function stepDown(sorted: readonly SweptPoint[], low: number, rule: StoppingRule): number | null {
  const last = sorted[0]!;
  if (last.p <= low * (1 + 1e-9) || last.frameErrors < fewErrors) return null;
  const measured = sorted.filter((point) => point.frameErrors >= fewErrors);
  const rates = measured.map((point) => ({ p: point.p, fer: rateOf(point) }));
  if (rates.length < 2) return rounded(Math.max(low, last.p * 0.75));
  const [a, b] = [rates[0]!, rates[1]!];
  const slope = Math.log(b.fer / a.fer) / Math.log(b.p / a.p);
  const ratio = slope > 0 ? decade ** (-1 / slope) : steepest;
  const next = Math.max(low, last.p * Math.min(gentlest, Math.max(steepest, ratio)));
  const expected = guessRate(rates, next) * framesToPlan(0, rule, 1);
  return expected < leastExpected ? null : rounded(next);
}

/** Half way, on the logarithmic axis, between the two neighbours whose rates differ most; not where they are within a
 *  factor of e of each other already. */
function betweenNeighbours(sorted: readonly SweptPoint[]): number | null {
  let widest = 1;
  let middle: number | null = null;
  for (let i = 1; i < sorted.length; i++) {
    const [a, b] = [sorted[i - 1]!, sorted[i]!];
    const gap = Math.abs(Math.log(rateOf(b) / rateOf(a)));
    const between = rounded(Math.sqrt(a.p * b.p));
    if (gap <= widest || between <= a.p || between >= b.p) continue;
    widest = gap;
    middle = between;
  }
  return middle;
}

/** Four digits, so that a point can be stated again by hand. */
const rounded = (p: number): number => Number(p.toPrecision(4));
