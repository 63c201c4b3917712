import type { Decoded } from '../decoders/decoder.ts';
import { emptyTally, type Tally } from './tally.ts';

/** Counts frames one by one. */
export interface TallyKeeper {
  add(sent: Uint8Array, decoded: Decoded): void;
  tally(): Tally;
}

export function keepTally(n: number): TallyKeeper {
  const tally = emptyTally();
  const histogram: number[] = [];
  return {
    add(sent, { word, iterations, converged }) {
      const wrong = differing(sent, word);
      tally.frames += 1;
      tally.bits += n;
      tally.iterations += iterations;
      tally.bitErrors += wrong;
      tally.bitErrorsSquared += wrong ** 2;
      if (wrong > 0) tally.frameErrors += 1;
      if (wrong > 0 && converged) tally.undetected += 1;
      histogram[iterations] = (histogram[iterations] ?? 0) + 1;
    },
    tally: () => ({ ...tally, iterationHistogram: Array.from(histogram, (count) => count ?? 0) }),
  };
}

function differing(a: Uint8Array, b: Uint8Array): number {
  let count = 0;
  for (let j = 0; j < a.length; j++) if (a[j] !== b[j]) count += 1;
  return count;
}
