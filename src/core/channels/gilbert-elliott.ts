import { type Random, uniform53 } from '../simulation/random.ts';
import type { Channel } from './channel.ts';

type GilbertElliott = Extract<Channel, { kind: 'gilbert-elliott' }>;

/** Bursts by a two-state Markov chain (Gilbert, Bell Syst. Tech. J. 39, 1960; Elliott, ibid. 42, 1963). A frame starts
 *  in the stationary state; each bit takes one draw for the error in the current state and one for the next state, so
 *  that frame f always starts at draw f·(2n + 1), whatever happened before. */
export function createBurstPatterns(n: number, channel: GilbertElliott, random: Random) {
  const { pGood, pBad, goodToBad, badToGood } = channel;
  const badShare = stationaryBadShare(channel);
  return {
    next(into: Uint32Array): number {
      let bad = uniform53(random) < badShare;
      let count = 0;
      for (let j = 0; j < n; j++) {
        if (uniform53(random) < (bad ? pBad : pGood)) into[count++] = j;
        if (uniform53(random) < (bad ? badToGood : goodToBad)) bad = !bad;
      }
      return count;
    },
  };
}

/** The long-run share of bits sent in the bad state. */
export function stationaryBadShare({ goodToBad, badToGood }: GilbertElliott): number {
  return goodToBad / (goodToBad + badToGood);
}

/** The long-run share of bits in error. */
export function meanCrossover(channel: GilbertElliott): number {
  const bad = stationaryBadShare(channel);
  return bad * channel.pBad + (1 - bad) * channel.pGood;
}
