import { type Decoder, iterativeDecoder } from './decoder.ts';
import { failingChecks, syndromeInto, type TannerGraph } from './tanner-graph.ts';

/** Parallel bit flipping (Gallager, Low-Density Parity-Check Codes, 1963, ch. 4): each iteration flips, all at once,
 *  every bit with at least its threshold of failing checks. An iteration that would flip none ends the frame and is not
 *  counted. A word can fall into a cycle; only the cap ends that. */
export function bitFlipping(graph: TannerGraph, thresholds: Uint32Array, cap: number): Decoder {
  const { H } = graph;
  const word = new Uint8Array(H.cols);
  const syndrome = new Uint8Array(H.rows);
  return iterativeDecoder(H, cap, {
    word,
    start: (received) => word.set(received),
    iterate() {
      syndromeInto(H, word, syndrome);
      let flipped = false;
      for (let j = 0; j < H.cols; j++) {
        if (failingChecks(graph, syndrome, j) < thresholds[j]!) continue;
        word[j]! ^= 1;
        flipped = true;
      }
      return flipped;
    },
  });
}

/** Flips every bit whose number of failing checks is the largest in the frame. Some check fails whenever an iteration
 *  is done, and no check is empty of bits, so that at least one bit is flipped each time. */
export function bitFlippingMax(graph: TannerGraph, cap: number): Decoder {
  const { H } = graph;
  const word = new Uint8Array(H.cols);
  const syndrome = new Uint8Array(H.rows);
  const failing = new Uint32Array(H.cols);
  return iterativeDecoder(H, cap, {
    word,
    start: (received) => word.set(received),
    iterate() {
      syndromeInto(H, word, syndrome);
      let most = 0;
      for (let j = 0; j < H.cols; j++) {
        failing[j] = failingChecks(graph, syndrome, j);
        most = Math.max(most, failing[j]!);
      }
      for (let j = 0; j < H.cols; j++) if (failing[j] === most) word[j]! ^= 1;
      return true;
    },
  });
}
