import type { Measurement } from '@/api/measurements.ts';
import type { Curve, CurvePoint, Estimate } from './curve.ts';

/** Measured data as curves, with intervals of their own. */
export const measuredCurves = (measurements: readonly Measurement[]): Curve[] =>
  measurements.map((measured) => ({
    key: `measured~${measured.id}`,
    runId: measured.id,
    codeId: measured.id,
    codeLabel: `(${measured.n},${measured.k}) ${measured.name}`,
    n: measured.n,
    k: measured.k,
    decoder: null,
    points: measured.points.map((point) => measuredPoint(measured, point)).sort((a, b) => b.p - a.p),
  }));

function measuredPoint(
  { id, n, level }: Measurement,
  { p, frames, frameErrors, bitErrors, interval }: Measurement['points'][number],
): CurvePoint {
  const fer: Estimate = { value: frameErrors === 0 ? null : frameErrors / frames, ...interval };
  // The spread of bit errors over frames is not known: a failed frame has at least one wrong bit, and at most n.
  const ber: Estimate = {
    value: !bitErrors ? null : bitErrors / (frames * n),
    lower: interval.lower / n,
    upper: interval.upper,
  };
  return {
    pointId: `${id}~${p}`,
    p,
    frames,
    frameErrors,
    bitErrors: bitErrors ?? 0,
    undetected: 0,
    iterationsMean: 0,
    done: true,
    fer,
    ber,
    level,
  };
}
