import type { Decoded } from '../decoders/decoder.ts';
import { emptyTally, type Tally } from './tally.ts';

/** Counts frames one by one. */
export interface TallyKeeper {
  /** @param times Frames that this one stands for; 1 unless given. */
  add(sent: Uint8Array, decoded: Decoded, times?: number): void;
  tally(): Tally;
}

/** @param counted Positions over which bit errors are counted; all n when not given. A frame fails by any position. */
export function keepTally(n: number, counted?: Uint32Array): TallyKeeper {
  const tally = emptyTally();
  const histogram: number[] = [];
  return {
    add(sent, { word, iterations, converged }, times = 1) {
      const failed = differing(sent, word) > 0;
      const wrong = counted ? differingAt(sent, word, counted) : differing(sent, word);
      tally.frames += times;
      tally.bits += times * (counted?.length ?? n);
      tally.iterations += times * iterations;
      tally.bitErrors += times * wrong;
      tally.bitErrorsSquared += times * wrong ** 2;
      if (failed) tally.frameErrors += times;
      if (failed && converged) tally.undetected += times;
      histogram[iterations] = (histogram[iterations] ?? 0) + times;
    },
    tally: () => ({ ...tally, iterationHistogram: Array.from(histogram, (count) => count ?? 0) }),
  };
}

function differing(a: Uint8Array, b: Uint8Array): number {
  let count = 0;
  for (let j = 0; j < a.length; j++) if (a[j] !== b[j]) count += 1;
  return count;
}

function differingAt(a: Uint8Array, b: Uint8Array, positions: Uint32Array): number {
  let count = 0;
  for (const j of positions) if (a[j] !== b[j]) count += 1;
  return count;
}
