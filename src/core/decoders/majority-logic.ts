import { type Decoder, iterativeDecoder } from './decoder.ts';
import { failingChecks, syndromeInto, type TannerGraph } from './tanner-graph.ts';

/** One-step majority logic (Massey, Threshold Decoding, 1963): a bit is flipped when more than half of its checks fail
 *  on the received word; a tie keeps it. Where the checks on each bit are orthogonal (no two meet in another bit) every
 *  pattern of ⌊min d_j / 2⌋ errors is corrected. */
export function majorityLogic(graph: TannerGraph): Decoder {
  const { H, bitStart } = graph;
  const word = new Uint8Array(H.cols);
  const syndrome = new Uint8Array(H.rows);
  return iterativeDecoder(H, 1, {
    word,
    start: (received) => word.set(received),
    iterate() {
      syndromeInto(H, word, syndrome);
      for (let j = 0; j < H.cols; j++) {
        const degree = bitStart[j + 1]! - bitStart[j]!;
        if (2 * failingChecks(graph, syndrome, j) > degree) word[j]! ^= 1;
      }
      return true;
    },
  });
}
