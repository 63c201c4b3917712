import { type Decoder, iterativeDecoder } from './decoder.ts';
import type { TannerGraph } from './tanner-graph.ts';

/** Gallager's hard message passing (Low-Density Parity-Check Codes, 1963, ch. 4; "A" and "B" as Richardson and Urbanke
 *  name them, IEEE Trans. Inf. Theory 47, 2001). Check i sends bit j the sum of the other bits' messages; bit j sends
 *  check i its received value, inverted when at least b_j of the other checks disagree with it; the decision inverts it
 *  when at least half of all its checks disagree, a tie included.
 *  @param thresholds b_j by bit, one list an iteration, the last standing for the rest. */
export function gallager(graph: TannerGraph, thresholds: readonly Uint32Array[], cap: number): Decoder {
  const { H, edgeCheck, bitStart, bitEdges } = graph;
  const word = new Uint8Array(H.cols);
  const received = new Uint8Array(H.cols);
  const toCheck = new Uint8Array(H.colIndex.length);
  const checkSum = new Uint8Array(H.rows);
  return iterativeDecoder(H, cap, {
    word,
    start(frame) {
      received.set(frame);
      word.set(received);
      for (let e = 0; e < toCheck.length; e++) toCheck[e] = received[H.colIndex[e]!]!;
    },
    iterate(iteration) {
      const threshold = thresholds[Math.min(iteration, thresholds.length - 1)]!;
      checkSum.fill(0);
      for (let e = 0; e < toCheck.length; e++) checkSum[edgeCheck[e]!]! ^= toCheck[e]!;
      const differs = (e: number, y: number) => checkSum[edgeCheck[e]!]! ^ toCheck[e]! ^ y;
      for (let j = 0; j < H.cols; j++) {
        const y = received[j]!;
        const edges = bitEdges.subarray(bitStart[j], bitStart[j + 1]);
        let disagreeing = 0;
        for (const e of edges) disagreeing += differs(e, y);
        word[j] = y ^ (2 * disagreeing >= edges.length ? 1 : 0);
        for (const e of edges) toCheck[e] = y ^ (disagreeing - differs(e, y) >= threshold[j]! ? 1 : 0);
      }
      return true;
    },
  });
}
