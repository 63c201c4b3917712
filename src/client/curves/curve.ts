import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Grade } from '@/core/evidence.ts';

/** Which error rate is looked at: of frames, or of bits over all n positions. */
export type RateKind = 'fer' | 'ber';

/** Fewer frame errors than this and a point counts as thin evidence: at 100 the relative standard error is 10 %. */
export const THIN_BELOW_FRAME_ERRORS = 100;

/** A measured rate. With no error seen there is no value, only the upper limit: `value` is then null, `lower` 0. */
export interface Estimate {
  value: number | null;
  lower: number;
  upper: number;
}

export interface CurvePoint {
  pointId: string;
  /** Crossover probability of the binary symmetric channel. */
  p: number;
  frames: number;
  frameErrors: number;
  bitErrors: number;
  undetected: number;
  /** Iterations a frame, on average. */
  iterationsMean: number;
  done: boolean;
  fer: Estimate;
  ber: Estimate;
  level: number;
  /** `bounded` where the rate comes from weight strata and its limits are rigorous; a direct sample when not given. */
  grade?: Extract<Grade, 'bounded' | 'sampled'>;
}

/** The points of one code under one decoder in one run, or of one set of measured data, from the worst channel to the
 *  best. */
export interface Curve {
  key: string;
  /** Of measured data the data set's. */
  runId: string;
  codeId: string;
  codeLabel: string;
  n: number;
  k: number;
  /** null of data measured elsewhere, whose decoder is not ours to state. */
  decoder: DecoderSpec | null;
  points: CurvePoint[];
  /** The rate at any p, of a curve that is known at every p and not only at its points. */
  at?: (p: number) => CurvePoint;
}

/** A curve made from weight strata: a line within a band. */
export type CombinedCurve = Curve & Required<Pick<Curve, 'at' | 'decoder'>>;

/** Where a point stands on the axis of p; null for channels that have no crossover probability of their own. */
export const crossoverOf = (point: Pick<Point, 'channel'>): number | null =>
  point.channel.kind === 'bsc' ? point.channel.p : null;

/** Rigorous limits say themselves how thin the evidence is. */
export const isThin = (point: Pick<CurvePoint, 'frameErrors' | 'grade'>): boolean =>
  point.grade !== 'bounded' && point.frameErrors < THIN_BELOW_FRAME_ERRORS;

/** The point of a curve at p: of a combined curve any, of another one that was measured there. */
export const pointAt = (curve: Pick<Curve, 'points' | 'at'>, p: number): CurvePoint | undefined =>
  curve.at && curve.points.length > 0 ? curve.at(p) : curve.points.find((point) => Math.abs(point.p / p - 1) < 1e-9);

/** The measured part of a point as a curve shows it; null while no frame is in, or off the axis of p. */
export function curvePointOf(point: Point): CurvePoint | null {
  const p = crossoverOf(point);
  const { tally } = point;
  if (p === null || tally.frames === 0) return null;
  return {
    pointId: point.id,
    p,
    frames: tally.frames,
    frameErrors: tally.frameErrors,
    bitErrors: tally.bitErrors,
    undetected: tally.undetected,
    iterationsMean: tally.iterations / tally.frames,
    done: point.done,
    fer: estimate(tally.frameErrors, point.fer, point.interval),
    ber: estimate(tally.bitErrors, point.ber, point.berInterval),
    level: point.level,
  };
}

const estimate = (errors: number, rate: number, interval: { lower: number; upper: number }): Estimate => ({
  value: errors === 0 ? null : rate,
  lower: interval.lower,
  upper: interval.upper,
});
