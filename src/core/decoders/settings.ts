import { ParamError } from '../errors.ts';
import type { DecoderSpec } from './decoder-spec.ts';
import { largestDegree } from './tanner-graph.ts';

/** What a decoder's spec leaves open, filled in; shared by the readable decoders and the fast ones, so that both mean
 *  the same. `degrees` are the column weights of H. */

type Of<K extends DecoderSpec['kind']> = Extract<DecoderSpec, { kind: K }>;

/** Iterations after which the current word stands. */
export function iterationCap(spec: DecoderSpec): number {
  switch (spec.kind) {
    case 'majority-logic':
    case 'elimination':
      return 1;
    case 'peeling':
      return 1000;
    case 'two-stage':
      return spec.stages.reduce((sum, stage) => sum + iterationCap(stage), 0);
    case 'gradient-descent':
    case 'finite-alphabet':
      return spec.iterations ?? 100;
    case 'sum-product':
    case 'min-sum':
      return spec.iterations ?? 50;
    default:
      return spec.iterations ?? 20;
  }
}

/** Least number of failing checks that flips each bit; a bit of weight below a given threshold is never flipped.
 *  @throws ParamError on a threshold that no bit can reach. */
export function flippingThresholds(degrees: Uint32Array, spec: Of<'bit-flipping'>): Uint32Array {
  if (spec.threshold === undefined) return degrees.map((d) => Math.floor(d / 2) + 1);
  refuseAbove('decoder.threshold', spec.threshold, degrees);
  return new Uint32Array(degrees.length).fill(spec.threshold);
}

/** Least number b_j of other checks that disagree with y_j for which bit j sends the opposite of y_j; one list an
 *  iteration, the last standing for the rest. Gallager A has b_j = d_j − 1, but 1 where a bit has one check only: with
 *  no other check to disagree, y_j is sent.
 *  @throws ParamError on a threshold that no bit can reach. */
export function messageThresholds(degrees: Uint32Array, spec: Of<'gallager-a' | 'gallager-b'>): Uint32Array[] {
  if (spec.kind === 'gallager-a') return [degrees.map((d) => Math.max(1, d - 1))];
  if (spec.threshold === undefined) return [degrees.map((d) => Math.ceil(d / 2))];
  const perIteration = typeof spec.threshold === 'number' ? [spec.threshold] : spec.threshold;
  return perIteration.map((threshold) => {
    refuseAbove('decoder.threshold', threshold, degrees);
    return new Uint32Array(degrees.length).fill(threshold);
  });
}

function refuseAbove(param: string, threshold: number, degrees: Uint32Array): void {
  const most = largestDegree(degrees);
  if (!Number.isInteger(threshold) || threshold < 1 || threshold > most)
    throw new ParamError(param, threshold, `a whole number from 1 to ${most}, the largest column weight`);
}

export type MinSumScale = NonNullable<Of<'min-sum'>['scale']>;
export interface MinSumSettings {
  cap: number;
  schedule: 'layered' | 'flooding';
  scale: MinSumScale;
  /** Magnitude of the channel value; its largest where the channel is soft. */
  c: number;
  /** Largest magnitude of a check's message. */
  rMax: number;
}

/** @throws ParamError where c + max d_j·rMax would pass 127 and 8-bit sums could saturate. */
export function minSumSettings(degrees: Uint32Array, spec: Of<'min-sum'>): MinSumSettings {
  const most = largestDegree(degrees);
  const c = spec.c ?? 16;
  const room = Math.floor((127 - c) / most);
  if (room < 1) {
    const accepted = `a channel value c that leaves 127 − c of at least ${most}, the largest column weight`;
    throw new ParamError('decoder.c', c, most < 127 ? accepted : 'min-sum only for column weights up to 126');
  }
  const rMax = spec.rMax ?? room;
  if (rMax > room)
    throw new ParamError('decoder.rMax', rMax, `at most ${room}, so that c + ${most}·rMax stays within 127`);
  return {
    cap: iterationCap(spec),
    schedule: spec.schedule ?? 'layered',
    scale: spec.scale ?? usualScale(most),
    c,
    rMax,
  };
}

/** The scale that short runs preferred for codes of that column weight: the more checks a bit has, the more their
 *  magnitudes overstate. `calibrate` finds the best one for a code. */
function usualScale(columnWeight: number): MinSumScale {
  if (columnWeight <= 6) return '3/4';
  if (columnWeight <= 12) return '1/2';
  return columnWeight <= 40 ? '1/4' : '1/8';
}

const eighths: Record<Exclude<MinSumScale, 'offset-1'>, number> = { '1/8': 1, '1/4': 2, '1/2': 4, '3/4': 6, '1': 8 };

/** The magnitude a check sends for the least magnitude m of the others: scaled down to a whole number, then cut. */
export function scaledMagnitude(m: number, settings: Pick<MinSumSettings, 'scale' | 'rMax'>): number {
  const scaled = settings.scale === 'offset-1' ? Math.max(m - 1, 0) : (m * eighths[settings.scale]) >> 3;
  return Math.min(scaled, settings.rMax);
}
