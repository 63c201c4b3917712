import { ParamError } from '../errors.ts';
import { fromDecibel, gaussianTail } from './portable-functions.ts';

/** Standard deviation of the noise on BPSK of amplitude 1: the variance is 1/(2·R·Eb/N0).
 *  @throws ParamError without a rate from above 0 to 1. */
export function noiseDeviation(ebn0Db: number, rate: number | undefined): number {
  return 1 / Math.sqrt(2 * checkedRate(rate) * fromDecibel(ebn0Db));
}

/** Crossover probability of the sign of that channel: p = Q(√(2·R·Eb/N0)).
 *  @throws ParamError without a rate, or where p is so small that no frame would ever show an error. */
export function hardCrossover(ebn0Db: number, rate: number | undefined): number {
  const p = gaussianTail(1 / noiseDeviation(ebn0Db, rate));
  if (!(p > 0)) throw new ParamError('channel.ebn0Db', ebn0Db, 'a level at which errors have a probability above 0');
  return p;
}

function checkedRate(rate: number | undefined): number {
  if (rate === undefined || !(rate > 0 && rate <= 1)) throw new ParamError('rate', rate, 'k/n, above 0 and at most 1');
  return rate;
}
