import { type Decoder, iterativeDecoder, type Received } from './decoder.ts';
import { type MinSumSettings, scaledMagnitude } from './settings.ts';
import { hardWord } from './sum-product.ts';
import type { TannerGraph } from './tanner-graph.ts';

/** Min-sum in 8-bit fixed point (Fossorier, Mihaljević and Imai, IEEE Trans. Commun. 47, 1999; scaled and offset forms
 *  by Chen and others, ibid. 53, 2005; layered schedule by Hocevar, SiPS 2004). Check i sends bit j the parity of the
 *  other messages' signs and their least magnitude, scaled and cut to rMax. Since c + max d_j·rMax ≤ 127, no sum
 *  saturates. Layered: checks in index order, each posterior updated at once; flooding: all checks from the posteriors
 *  of the iteration before. */
export function minSum(graph: TannerGraph, settings: MinSumSettings): Decoder {
  const { H } = graph;
  const word = new Uint8Array(H.cols);
  const hard = new Uint8Array(H.cols);
  const channel = new Int8Array(H.cols);
  const posterior = new Int8Array(H.cols);
  const toBit = new Int8Array(H.colIndex.length);
  const table = Uint8Array.from({ length: 256 }, (_, m) => scaledMagnitude(m, settings));
  const layered = settings.schedule === 'layered';
  return iterativeDecoder(H, settings.cap, {
    word,
    start(received) {
      hardWord(received, hard);
      fixedPointChannel(received, hard, settings.c, channel);
      word.set(hard);
      posterior.set(channel);
      toBit.fill(0);
    },
    iterate() {
      for (let i = 0; i < H.rows; i++) updateCheck(graph, i, posterior, toBit, table, layered);
      if (!layered) {
        posterior.set(channel);
        for (let e = 0; e < toBit.length; e++) posterior[H.colIndex[e]!]! += toBit[e]!;
      }
      for (let j = 0; j < H.cols; j++) word[j] = posterior[j] === 0 ? hard[j]! : posterior[j]! < 0 ? 1 : 0;
      return true;
    },
  });
}

/** ±c for a hard bit. A real output y becomes y·c/2, rounded half away from 0 and cut to ±c, so that the full scale is
 *  twice the amplitude sent. */
export function fixedPointChannel(received: Received, hard: Uint8Array, c: number, into: Int8Array): void {
  for (let j = 0; j < received.length; j++) {
    const magnitude =
      received instanceof Uint8Array ? c : Math.min(c, Math.floor((Math.abs(received[j]!) * c) / 2 + 0.5));
    into[j] = hard[j] === 1 ? -magnitude : magnitude;
  }
}

function updateCheck(
  { H }: TannerGraph,
  i: number,
  posterior: Int8Array,
  toBit: Int8Array,
  scaled: Uint8Array,
  layered: boolean,
): void {
  const from = H.rowStart[i]!;
  const to = H.rowStart[i + 1]!;
  let least = 255;
  let second = 255;
  let leastAt = -1;
  let parity = 0;
  for (let e = from; e < to; e++) {
    const message = posterior[H.colIndex[e]!]! - toBit[e]!;
    const magnitude = Math.abs(message);
    if (message < 0) parity ^= 1;
    if (magnitude < least) {
      second = least;
      least = magnitude;
      leastAt = e;
    } else if (magnitude < second) second = magnitude;
  }
  for (let e = from; e < to; e++) {
    const j = H.colIndex[e]!;
    const message = posterior[j]! - toBit[e]!;
    const magnitude = scaled[e === leastAt ? second : least]!;
    const others = parity ^ (message < 0 ? 1 : 0);
    toBit[e] = others ? -magnitude : magnitude;
    if (layered) posterior[j] = message + toBit[e]!;
  }
}
