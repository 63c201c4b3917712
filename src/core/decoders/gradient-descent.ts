import { type Decoder, iterativeDecoder } from './decoder.ts';
import type { DecoderSpec } from './decoder-spec.ts';
import { failingChecks, syndromeInto, type TannerGraph } from './tanner-graph.ts';

type GradientDescent = Extract<DecoderSpec, { kind: 'gradient-descent' }>;

/** Gradient-descent bit flipping (Wadayama and others, IEEE Trans. Commun. 58, 2010), on hard outputs. With bipolar
 *  words the inversion function is Δ_j = x_j·y_j + Σ_i Π_l x_l, that is ±1 for agreement with the received bit, plus the
 *  checks on j that hold, less those that fail. `multi` flips every bit with Δ_j below the threshold, and ends the
 *  frame when there is none; `single` flips the bit of least Δ_j, of lowest index at a tie. */
export function gradientDescent(graph: TannerGraph, spec: GradientDescent, cap: number): Decoder {
  const { H, bitStart } = graph;
  const threshold = spec.threshold ?? -0.5;
  const word = new Uint8Array(H.cols);
  const received = new Uint8Array(H.cols);
  const syndrome = new Uint8Array(H.rows);
  const inversion = (j: number) => {
    const degree = bitStart[j + 1]! - bitStart[j]!;
    return (word[j] === received[j] ? 1 : -1) + degree - 2 * failingChecks(graph, syndrome, j);
  };
  return iterativeDecoder(H, cap, {
    word,
    start(frame) {
      received.set(frame);
      word.set(received);
    },
    iterate() {
      syndromeInto(H, word, syndrome);
      return (spec.flips ?? 'multi') === 'single' ? flipLeast(word, inversion) : flipBelow(word, inversion, threshold);
    },
  });
}

function flipLeast(word: Uint8Array, inversion: (j: number) => number): boolean {
  let least = 0;
  for (let j = 1; j < word.length; j++) if (inversion(j) < inversion(least)) least = j;
  word[least]! ^= 1;
  return true;
}

/** Δ_j depends on no bit but j once the syndrome is known, so that flipping while going through is flipping at once. */
function flipBelow(word: Uint8Array, inversion: (j: number) => number, threshold: number): boolean {
  let flipped = false;
  for (let j = 0; j < word.length; j++) {
    if (inversion(j) >= threshold) continue;
    word[j]! ^= 1;
    flipped = true;
  }
  return flipped;
}
