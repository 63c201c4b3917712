import { scientific } from '@/components/ui/numbers.ts';
import type { Channel } from '@/core/channels/channel.ts';

export const CHANNEL_NAMES: Record<Channel['kind'], string> = {
  bsc: 'binary symmetric',
  bec: 'binary erasure',
  awgn: 'Gaussian noise, soft decisions',
  'awgn-hard': 'Gaussian noise, hard decisions',
  z: 'Z, flips ones only',
  'gilbert-elliott': 'Gilbert–Elliott bursts',
  stratum: 'patterns of one weight',
};

const decibel = (value: number) => `${scientific(value)}\u202fdB`;

/** Parameters of a channel in words, after its name: "p = 0.012". */
export function channelDetail(channel: Channel): string {
  switch (channel.kind) {
    case 'bsc':
    case 'z':
      return `p = ${scientific(channel.p)}`;
    case 'bec':
      return `e = ${scientific(channel.e)}`;
    case 'awgn':
    case 'awgn-hard':
      return `Eb/N0 = ${decibel(channel.ebn0Db)}`;
    case 'gilbert-elliott':
      return `p good ${scientific(channel.pGood)}, p bad ${scientific(channel.pBad)}, to bad ${scientific(channel.goodToBad)}, to good ${scientific(channel.badToGood)}`;
    case 'stratum':
      return `weight ${channel.weight}`;
  }
}
