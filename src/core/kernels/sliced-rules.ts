import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { flippingThresholds, iterationCap, messageThresholds } from '../decoders/settings.ts';
import { columnDegrees, largestDegree, type TannerGraph, tannerGraph } from '../decoders/tanner-graph.ts';

/** A decoder on 32 frames at once, bit l of each word for frame l. */
export interface SlicedRule {
  readonly cap: number;
  /** The frames' words; new frames are drawn into it. */
  readonly word: Uint32Array;
  /** Takes the new frames of these lanes from the word. */
  begin(fresh: number): void;
  /** Lanes whose word fails some check. */
  failing(): number;
  /** One iteration in the active lanes; returns those in which nothing was flipped, where that ends a frame. */
  iterate(active: number): number;
}

/** @throws ParamError on settings that the matrix does not allow. */
export function slicedRule(H: SparseMatrix, decoder: DecoderSpec): SlicedRule | null {
  const degrees = columnDegrees(H);
  const cap = iterationCap(decoder);
  switch (decoder.kind) {
    case 'majority-logic':
      return flipping(
        H,
        degrees.map((d) => Math.floor(d / 2) + 1),
        cap,
        false,
      );
    case 'bit-flipping':
      return flipping(H, flippingThresholds(degrees, decoder), cap, true);
    case 'gallager-a':
    case 'gallager-b': {
      const thresholds = messageThresholds(degrees, decoder);
      return thresholds.length > 1 ? null : messages(H, degrees, thresholds[0]!, cap);
    }
    default:
      return null;
  }
}

/** Numbers of 32 frames as binary digits, lowest first. */
class Counter {
  readonly #digits: Uint32Array;
  constructor(largest: number) {
    this.#digits = new Uint32Array(32 - Math.clz32(largest));
  }
  clear(): void {
    this.#digits.fill(0);
  }
  add(bits: number): void {
    let carry = bits;
    for (let k = 0; carry !== 0; k++) {
      const digit = this.#digits[k]!;
      this.#digits[k] = digit ^ carry;
      carry &= digit;
    }
  }
  /** Frames whose number is at least the threshold. */
  atLeast(threshold: number): number {
    if (threshold >= 2 ** this.#digits.length) return 0;
    let met = -1;
    for (let k = 0; k < this.#digits.length; k++)
      met = (threshold >> k) & 1 ? met & this.#digits[k]! : met | this.#digits[k]!;
    return met;
  }
}

function sumsInto(H: SparseMatrix, word: Uint32Array, sums: Uint32Array): number {
  let failing = 0;
  for (let i = 0; i < H.rows; i++) {
    let sum = 0;
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) sum ^= word[H.colIndex[e]!]!;
    sums[i] = sum;
    failing |= sum;
  }
  return failing;
}

function flipping(H: SparseMatrix, thresholds: Uint32Array, cap: number, stops: boolean): SlicedRule {
  const { edgeCheck, bitStart, bitEdges } = tannerGraph(H);
  const checkOf = bitEdges.map((e) => edgeCheck[e]!);
  const word = new Uint32Array(H.cols);
  const syndrome = new Uint32Array(H.rows);
  const counter = new Counter(largestDegree(columnDegrees(H)));
  return {
    cap,
    word,
    begin: () => {},
    failing: () => sumsInto(H, word, syndrome),
    iterate(active) {
      let flipped = 0;
      for (let j = 0; j < H.cols; j++) {
        counter.clear();
        for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++) counter.add(syndrome[checkOf[t]!]!);
        const flips = counter.atLeast(thresholds[j]!) & active;
        flipped |= flips;
        word[j]! ^= flips;
      }
      return stops ? active & ~flipped : 0;
    },
  };
}

function messages(H: SparseMatrix, degrees: Uint32Array, thresholds: Uint32Array, cap: number): SlicedRule {
  const graph: TannerGraph = tannerGraph(H);
  const { edgeCheck, bitStart, bitEdges } = graph;
  const word = new Uint32Array(H.cols);
  const received = new Uint32Array(H.cols);
  const toCheck = new Uint32Array(H.colIndex.length);
  const sums = new Uint32Array(H.rows);
  const counter = new Counter(largestDegree(degrees));
  const take = (old: number, taken: number, lanes: number) => (old & ~lanes) | (taken & lanes);
  return {
    cap,
    word,
    begin(fresh) {
      for (let j = 0; j < H.cols; j++) received[j] = take(received[j]!, word[j]!, fresh);
      for (let e = 0; e < toCheck.length; e++) toCheck[e] = take(toCheck[e]!, word[H.colIndex[e]!]!, fresh);
    },
    failing: () => sumsInto(H, word, sums),
    iterate() {
      sums.fill(0);
      for (let e = 0; e < toCheck.length; e++) sums[edgeCheck[e]!]! ^= toCheck[e]!;
      for (let j = 0; j < H.cols; j++) {
        const y = received[j]!;
        const edges = bitEdges.subarray(bitStart[j], bitStart[j + 1]);
        counter.clear();
        for (const e of edges) counter.add(sums[edgeCheck[e]!]! ^ toCheck[e]! ^ y);
        const reached = counter.atLeast(thresholds[j]!);
        const exact = reached & ~counter.atLeast(thresholds[j]! + 1);
        word[j] = y ^ counter.atLeast(Math.ceil(edges.length / 2));
        // Where the threshold is met exactly, a check that disagrees is told y itself.
        for (const e of edges) toCheck[e] = y ^ (reached & ~(exact & (sums[edgeCheck[e]!]! ^ toCheck[e]! ^ y)));
      }
      return 0;
    },
  };
}
