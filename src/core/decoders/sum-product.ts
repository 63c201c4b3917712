import type { ChannelReading } from '../channels/reading.ts';
import { type Decoder, type DecodingRule, iterativeDecoder, type Received } from './decoder.ts';
import type { TannerGraph } from './tanner-graph.ts';

/** Messages are cut to this before tanh, which would otherwise round to 1. */
const largestMessage = 30;
const largestProduct = 1 - 1e-15;
/** A total this near to 0 says nothing: the received bit stands. */
const undecided = 1e-9;

export interface SumProduct extends Decoder {
  /** Log-likelihood ratios after the latest iteration. */
  readonly total: Float64Array;
  /** Does one iteration whether or not the word is a codeword already; for following the totals. */
  iterate(): void;
}

/** Sum-product decoding, flooding, in log-likelihood ratios (Gallager 1963; Kschischang, Frey and Loeliger, IEEE Trans.
 *  Inf. Theory 47, 2001): exact marginals on a graph without cycles, an approximation on any other. Floating point: two
 *  engines may differ in the last bits, and so, rarely, in a decision. */
export function sumProduct(graph: TannerGraph, readChannel: ChannelReading, cap: number): SumProduct {
  const { H } = graph;
  const word = new Uint8Array(H.cols);
  const hard = new Uint8Array(H.cols);
  const channel = new Float64Array(H.cols);
  const total = new Float64Array(H.cols);
  const toBit = new Float64Array(H.colIndex.length);
  const factors = new Float64Array(H.cols);
  const rule: DecodingRule = {
    word,
    start(received) {
      readChannel(received, channel);
      total.set(channel);
      toBit.fill(0);
      hardWord(received, hard);
      word.set(hard);
    },
    iterate() {
      for (let i = 0; i < H.rows; i++) updateCheck(graph, i, total, toBit, factors);
      total.set(channel);
      for (let e = 0; e < toBit.length; e++) total[H.colIndex[e]!]! += toBit[e]!;
      for (let j = 0; j < H.cols; j++) word[j] = Math.abs(total[j]!) <= undecided ? hard[j]! : total[j]! < 0 ? 1 : 0;
      return true;
    },
  };
  return { ...iterativeDecoder(H, cap, rule), total, iterate: () => void rule.iterate(0) };
}

/** The received bits; the sign of a real output, 0 where it is 0. */
export function hardWord(received: Received, into: Uint8Array): void {
  if (received instanceof Uint8Array) into.set(received);
  else for (let j = 0; j < received.length; j++) into[j] = received[j]! < 0 ? 1 : 0;
}

/** 2·atanh of the product of tanh(m/2) over the other edges, by products from the left and from the right: dividing
 *  the whole product by one factor would lose everything where that factor is 0. */
function updateCheck(
  { H }: TannerGraph,
  i: number,
  total: Float64Array,
  toBit: Float64Array,
  factors: Float64Array,
): void {
  const from = H.rowStart[i]!;
  const to = H.rowStart[i + 1]!;
  const factor = (e: number) => {
    const message = total[H.colIndex[e]!]! - toBit[e]!;
    return Math.tanh(Math.min(largestMessage, Math.max(-largestMessage, message)) / 2);
  };
  for (let e = from; e < to; e++) factors[e - from] = factor(e);
  let left = 1;
  for (let e = from; e < to; e++) {
    toBit[e] = left;
    left *= factors[e - from]!;
  }
  let right = 1;
  for (let e = to - 1; e >= from; e--) {
    const product = toBit[e]! * right;
    toBit[e] = 2 * Math.atanh(Math.min(largestProduct, Math.max(-largestProduct, product)));
    right *= factors[e - from]!;
  }
}
