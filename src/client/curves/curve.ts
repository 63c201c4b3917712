import type { Point } from '@/api/runs.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

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
}

/** Where a point stands on the axis of p; null for channels that have no crossover probability of their own. */
export const crossoverOf = (point: Pick<Point, 'channel'>): number | null =>
  point.channel.kind === 'bsc' ? point.channel.p : null;

export const isThin = (point: Pick<CurvePoint, 'frameErrors'>): boolean => point.frameErrors < THIN_BELOW_FRAME_ERRORS;

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
