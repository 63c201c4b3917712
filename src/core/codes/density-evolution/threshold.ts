import { ParamError } from '../../errors.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { type EdgeDegrees, edgeDegreesOf, regularDegrees } from './edge-degrees.ts';
import { erasureThreshold, gallagerThreshold } from './hard-thresholds.ts';
import { awgnSoftThreshold, bscSoftThreshold } from './soft-thresholds.ts';

export type ThresholdChannel = 'bsc' | 'bec' | 'awgn';
export type ThresholdDecoder = 'gallager-a' | 'gallager-b' | 'peeling' | 'sum-product' | 'min-sum';

export interface ThresholdQuestion {
  channel: ThresholdChannel;
  decoder: ThresholdDecoder;
  /** Algorithm B only: the fixed number of disagreeing checks that turns a message; without it the best at each step. */
  flip?: number;
}

/** The worst channel that the decoder corrects on long, cycle-free (dv, dc)-regular codes: p on the BSC, the erasure
 *  probability on the BEC, the noise deviation for unit symbols on the AWGN channel. Says nothing certain of any one
 *  finite code: short cycles come before it.
 *  @throws ParamError for a decoder that the channel does not have. */
export function threshold({ dv, dc, ...question }: { dv: number; dc: number } & ThresholdQuestion): number {
  return thresholdOfDegrees(regularDegrees(dv, dc), question);
}

/** The same for the ensemble of all matrices with the row and column weights of this one. */
export function thresholdOfMatrix(H: SparseMatrix, question: ThresholdQuestion): number {
  return thresholdOfDegrees(edgeDegreesOf(H), question);
}

function thresholdOfDegrees(degrees: EdgeDegrees, { channel, decoder, flip }: ThresholdQuestion): number {
  if (channel === 'bec') {
    // Sum-product and peeling do the same on erasures.
    if (decoder !== 'peeling' && decoder !== 'sum-product') refuse(decoder, '"peeling" or "sum-product" on the BEC');
    return erasureThreshold(degrees);
  }
  if (channel === 'bsc') {
    if (decoder === 'gallager-a') return gallagerThreshold(degrees, { unanimous: true });
    if (decoder === 'gallager-b') return gallagerThreshold(degrees, { flip });
    if (decoder === 'sum-product' || decoder === 'min-sum') return bscSoftThreshold(degrees, decoder);
    return refuse(decoder, '"gallager-a", "gallager-b", "sum-product" or "min-sum" on the BSC');
  }
  if (channel === 'awgn') {
    if (decoder === 'sum-product' || decoder === 'min-sum') return awgnSoftThreshold(degrees, decoder);
    return refuse(decoder, '"sum-product" or "min-sum" on the AWGN channel');
  }
  throw new ParamError('channel', channel, '"bsc", "bec" or "awgn"');
}

function refuse(decoder: string, accepted: string): never {
  throw new ParamError('decoder', decoder, accepted);
}
