import type { Channel } from '../channels/channel.ts';
import { ParamError } from '../errors.ts';
import { binaryInputAwgn, type ChannelMoments, noiseDeviation } from './awgn-capacity.ts';
import { becCapacity, becDispersion } from './bec-capacity.ts';
import { bscCapacity, bscDispersion } from './bsc-capacity.ts';
import { normalTail } from './normal-tail.ts';

/** Frame error rate that the best code of length n and dimension k is expected to have, by the normal approximation
 *  log2 M ≈ nC − √(nV)·Q⁻¹(ε) + ½·log2 n, without the last term on the erasure channel (Polyanskiy, Poor and Verdú 2010,
 *  Theorems 52 and 53). An approximation, not a bound: at n = 273, p = 0.02 it passes the converse.
 *  @throws ParamError for a channel without a dispersion formula here, and for k outside 1 … n. */
export function normalApproximation({ channel, n, k }: { channel: Channel; n: number; k: number }): number {
  if (!(n >= 1)) throw new ParamError('n', n, 'a length of 1 or more');
  if (!(k > 0 && k <= n)) throw new ParamError('k', k, `a dimension above 0, at most n = ${n}`);
  const { capacity, dispersion } = momentsOf(channel, k / n);
  const logTerm = channel.kind === 'bec' ? 0 : 0.5 * Math.log2(n);
  const slack = n * capacity - k + logTerm;
  if (dispersion === 0) return slack >= 0 ? 0 : 1;
  return normalTail(slack / Math.sqrt(n * dispersion));
}

/** The same read the other way: log2 M at a frame error rate. */
export function normalApproximationBits(channel: Channel, n: number, quantile: number, rate = 0.5): number {
  const { capacity, dispersion } = momentsOf(channel, rate);
  return n * capacity - Math.sqrt(n * dispersion) * quantile + (channel.kind === 'bec' ? 0 : 0.5 * Math.log2(n));
}

function momentsOf(channel: Channel, rate: number): ChannelMoments {
  switch (channel.kind) {
    case 'bsc':
      return { capacity: bscCapacity(channel.p), dispersion: bscDispersion(channel.p) };
    case 'bec':
      return { capacity: becCapacity(channel.e), dispersion: becDispersion(channel.e) };
    case 'awgn':
      return binaryInputAwgn(noiseDeviation(channel.ebn0Db, rate));
    case 'awgn-hard': {
      const p = normalTail(1 / noiseDeviation(channel.ebn0Db, rate));
      return { capacity: bscCapacity(p), dispersion: bscDispersion(p) };
    }
    default:
      throw new ParamError('channel.kind', channel.kind, '"bsc", "bec", "awgn" or "awgn-hard"');
  }
}
