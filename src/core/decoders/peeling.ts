import { type Decoder, erased, fromSteps } from './decoder.ts';
import type { TannerGraph } from './tanner-graph.ts';

/** Peeling of erasures (Luby and others, IEEE Trans. Inf. Theory 47, 2001): a check with one erased bit left gives that
 *  bit. An iteration is a pass through the checks in index order, each solved at once; a pass that solves nothing ends
 *  the frame and is not counted. What stays erased is the largest stopping set within the erasures, whatever the order
 *  (Di and others, ibid. 48, 2002). */
export function peeling(graph: TannerGraph, cap: number): Decoder {
  const { H } = graph;
  const word = new Uint8Array(H.cols);
  let iterations = 0;
  const pass = () => {
    let solved = false;
    for (let i = 0; i < H.rows; i++) {
      const { count, at, sum } = erasedBits(graph, i, word);
      if (count !== 1) continue;
      word[at] = sum;
      solved = true;
    }
    return solved;
  };
  return fromSteps({
    begin(received) {
      word.set(received);
      iterations = 0;
    },
    step() {
      if (!word.includes(erased)) return { word, iterations, converged: true };
      if (iterations === cap || !pass()) return { word, iterations, converged: false };
      iterations += 1;
      return null;
    },
  });
}

/** The erased bits of check i: how many, the last of them, and the sum of the known ones. */
function erasedBits({ H }: TannerGraph, i: number, word: Uint8Array) {
  let count = 0;
  let at = -1;
  let sum = 0;
  for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) {
    const j = H.colIndex[e]!;
    if (word[j] === erased) {
      count += 1;
      at = j;
    } else sum ^= word[j]!;
  }
  return { count, at, sum };
}
