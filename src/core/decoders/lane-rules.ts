import type { DecoderSpec } from './decoder-spec.ts';
import { flippingThresholds, messageThresholds } from './settings.ts';
import { columnDegrees, largestDegree, type TannerGraph } from './tanner-graph.ts';

/** Hard-decision decoding of 32 frames at once, one a lane: bit l of every word belongs to the frame in lane l, and the
 *  decoders become exclusive ors, carries and comparisons of words. The same as the readable decoders, bit for bit. */
export interface LaneRule {
  /** The current words x: the lanes of bit j. */
  readonly word: Int32Array;
  /** Takes the frames newly put into `word` in these lanes. */
  load(lanes: number): void;
  /** One iteration in these lanes, given the syndrome of `word`; returns the lanes whose frame goes on. */
  iterate(lanes: number, syndrome: Int32Array): number;
}

/** The rule of a decoder; null where there is none in lanes: other decoders, and thresholds that change by iteration,
 *  since lanes are at different iterations. */
export function laneRule(graph: TannerGraph, spec: DecoderSpec): LaneRule | null {
  const degrees = columnDegrees(graph.H);
  switch (spec.kind) {
    case 'majority-logic':
      return flippingLanes(graph, degrees, majority(degrees), false);
    case 'bit-flipping':
      return flippingLanes(graph, degrees, flippingThresholds(degrees, spec), true);
    case 'gallager-a':
    case 'gallager-b': {
      const thresholds = messageThresholds(degrees, spec);
      return thresholds.length === 1 ? gallagerLanes(graph, degrees, thresholds[0]!) : null;
    }
    default:
      return null;
  }
}

const majority = (degrees: Uint32Array) => degrees.map((d) => Math.floor(d / 2) + 1);

function flippingLanes(
  { H, edgeCheck, bitStart, bitEdges }: TannerGraph,
  degrees: Uint32Array,
  thresholds: Uint32Array,
  stopsWhenStuck: boolean,
): LaneRule {
  const word = new Int32Array(H.cols);
  const checks = bitEdges.map((e) => edgeCheck[e]!);
  const counter = laneCounter(largestDegree(degrees));
  return {
    word,
    load() {},
    iterate(lanes, syndrome) {
      let flipped = 0;
      for (let j = 0; j < H.cols; j++) {
        counter.clear();
        for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++) counter.add(syndrome[checks[t]!]!);
        const flip = counter.atLeast(thresholds[j]!) & lanes;
        word[j]! ^= flip;
        flipped |= flip;
      }
      return stopsWhenStuck ? flipped : lanes;
    },
  };
}

function gallagerLanes(
  { H, edgeCheck, bitStart, bitEdges }: TannerGraph,
  degrees: Uint32Array,
  thresholds: Uint32Array,
): LaneRule {
  const word = new Int32Array(H.cols);
  const received = new Int32Array(H.cols);
  const toCheck = new Int32Array(H.colIndex.length);
  const checkSum = new Int32Array(H.rows);
  const counter = laneCounter(largestDegree(degrees));
  return {
    word,
    load(lanes) {
      for (let j = 0; j < H.cols; j++) received[j] = (received[j]! & ~lanes) | (word[j]! & lanes);
      for (let e = 0; e < toCheck.length; e++)
        toCheck[e] = (toCheck[e]! & ~lanes) | (received[H.colIndex[e]!]! & lanes);
    },
    iterate(lanes) {
      checkSum.fill(0);
      for (let e = 0; e < toCheck.length; e++) checkSum[edgeCheck[e]!]! ^= toCheck[e]!;
      for (let j = 0; j < H.cols; j++) {
        const y = received[j]!;
        counter.clear();
        for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++) {
          const e = bitEdges[t]!;
          counter.add(checkSum[edgeCheck[e]!]! ^ toCheck[e]! ^ y);
        }
        word[j] = y ^ counter.atLeast(Math.ceil(degrees[j]! / 2));
        // D less one where the message itself differs is at least b: D is above b, or is b and the message agrees.
        const reaches = counter.atLeast(thresholds[j]!);
        const passes = counter.atLeast(thresholds[j]! + 1);
        for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++) {
          const e = bitEdges[t]!;
          const differs = checkSum[edgeCheck[e]!]! ^ toCheck[e]! ^ y;
          toCheck[e] = y ^ (passes | (reaches & ~differs));
        }
      }
      return lanes;
    },
  };
}

/** A count in each lane, held as one word for each of its binary digits. */
function laneCounter(most: number) {
  const digits = 32 - Math.clz32(most);
  const planes = new Int32Array(digits);
  return {
    clear: () => planes.fill(0),
    /** Adds one in these lanes. */
    add(lanes: number) {
      let carry = lanes;
      for (let k = 0; carry !== 0; k++) {
        const digit = planes[k]!;
        planes[k] = digit ^ carry;
        carry &= digit;
      }
    },
    /** The lanes whose count is at least b: from the lowest digit up, what is set decides unless a higher one differs. */
    atLeast(b: number): number {
      if (b >= 2 ** digits) return 0;
      let lanes = -1;
      for (let k = 0; k < digits; k++) lanes = (b >>> k) & 1 ? planes[k]! & lanes : planes[k]! | lanes;
      return lanes;
    },
  };
}
