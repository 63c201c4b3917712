import { createDecoder, decodesErasures } from '../../src/core/decoders/create-decoder.ts';
import { erased } from '../../src/core/decoders/decoder.ts';
import type { RunSpec } from '../../src/core/simulation/run-spec.ts';

/** Counts over all patterns of a weight, each decoded: what an enumeration up to symmetry must come to. */
export function countEveryPattern(spec: Pick<RunSpec, 'H' | 'decoder'>, weight: number) {
  const { H, decoder: named } = spec;
  const decoder = createDecoder(H, named, { kind: 'stratum', weight });
  const mark = decodesErasures(named) ? erased : 1;
  const counts = { frames: 0, frameErrors: 0, bitErrors: 0, bitErrorsSquared: 0, undetected: 0 };
  const received = new Uint8Array(H.cols);
  const visit = (from: number, left: number) => {
    if (left > 0) {
      for (let j = from; j <= H.cols - left; j++) {
        received[j] = mark;
        visit(j + 1, left - 1);
        received[j] = 0;
      }
      return;
    }
    const { word, converged } = decoder.decode(received);
    const wrong = word.reduce((sum, bit) => sum + (bit === 0 ? 0 : 1), 0);
    counts.frames += 1;
    counts.bitErrors += wrong;
    counts.bitErrorsSquared += wrong ** 2;
    if (wrong > 0) counts.frameErrors += 1;
    if (wrong > 0 && converged) counts.undetected += 1;
  };
  visit(0, weight);
  return counts;
}
