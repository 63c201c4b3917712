import type { Received } from '../decoders/decoder.ts';
import { ParamError } from '../errors.ts';
import { hardCrossover, noiseDeviation } from './awgn.ts';
import type { Channel } from './channel.ts';
import { meanCrossover } from './gilbert-elliott.ts';

/** Writes the log-likelihood ratio log P(output | 0) − log P(output | 1) of each bit. */
export type ChannelReading = (received: Received, into: Float64Array) => void;

/** The ratio of a certain bit, where the law gives an infinite one. */
const certain = 30;

/** How a soft decoder reads the channel's outputs.
 *  @param designP Reads hard outputs as a binary symmetric channel with this p, whatever the channel is.
 *  @throws ParamError where no law is at hand: a stratum without a design p, an erasure channel. */
export function channelReading(channel: Channel, rate: number | undefined, designP?: number): ChannelReading {
  if (channel.kind === 'awgn') {
    const variance = noiseDeviation(channel.ebn0Db, rate) ** 2;
    return (received, into) => into.set(received.map((y) => (2 * y) / variance) as Float64Array);
  }
  const [zero, one] = hardRatios(channel, rate, designP);
  return (received, into) => {
    for (let j = 0; j < received.length; j++) into[j] = received[j] === 0 ? zero : one;
  };
}

/** Ratios of a received 0 and a received 1. */
function hardRatios(channel: Channel, rate: number | undefined, designP: number | undefined): [number, number] {
  const symmetric = (p: number): [number, number] => [Math.log((1 - p) / p), -Math.log((1 - p) / p)];
  if (designP !== undefined) return symmetric(designP);
  switch (channel.kind) {
    case 'bsc':
      return symmetric(channel.p);
    case 'awgn-hard':
      return symmetric(hardCrossover(channel.ebn0Db, rate));
    case 'gilbert-elliott':
      // The decoder knows the long-run error rate only, not the state.
      return symmetric(meanCrossover(channel));
    case 'z':
      // A received 1 was sent; a received 0 may be a 1 that flipped.
      return [Math.log(1 / channel.p), -certain];
    case 'stratum':
      throw new ParamError('decoder.designP', designP, 'the p the decoder is to assume, since a stratum has none');
    default:
      throw new ParamError('channel.kind', channel.kind, 'for this decoder a channel that gives hard or real outputs');
  }
}
