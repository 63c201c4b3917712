import type { Channel } from '@/core/channels/channel.ts';

/** The channel of a point by its parameters: "0.012" for the binary symmetric one, which the axes name; others say
 *  what their number is. `number` writes a parameter. */
export function channelText(channel: Channel, number: (value: number) => string): string {
  switch (channel.kind) {
    case 'bsc':
      return number(channel.p);
    case 'bec':
      return `erased ${number(channel.e)}`;
    case 'z':
      return `Z, ${number(channel.p)}`;
    case 'awgn':
    case 'awgn-hard':
      return `${channel.ebn0Db} dB${channel.kind === 'awgn-hard' ? ', hard' : ''}`;
    case 'gilbert-elliott':
      return `bursts, ${number(channel.pGood)} and ${number(channel.pBad)}`;
    case 'stratum':
      return `weight ${channel.weight}`;
  }
}
