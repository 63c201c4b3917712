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
  const votes = new Int32Array(largestDegree(degrees));
  const counter = laneCounter(votes.length);
  return {
    word,
    load() {},
    iterate(lanes, syndrome) {
      let flipped = 0;
      for (let j = 0; j < H.cols; j++) {
        const from = bitStart[j]!;
        const degree = degrees[j]!;
        for (let t = 0; t < degree; t++) votes[t] = syndrome[checks[from + t]!]!;
        counter.count(votes, degree);
        const flip = counter.atLeast(thresholds[j]!) & lanes;
        word[j]! ^= flip;
        flipped |= flip;
      }
      return stopsWhenStuck ? flipped : lanes;
    },
  };
}

/** Messages are kept in the order of the bits' edges, so that those of a bit lie side by side. */
function gallagerLanes(
  { H, edgeCheck, bitStart, bitEdges }: TannerGraph,
  degrees: Uint32Array,
  thresholds: Uint32Array,
): LaneRule {
  const word = new Int32Array(H.cols);
  const received = new Int32Array(H.cols);
  const checks = bitEdges.map((e) => edgeCheck[e]!);
  const toCheck = new Int32Array(checks.length);
  const checkSum = new Int32Array(H.rows);
  const differs = new Int32Array(largestDegree(degrees));
  const counter = laneCounter(differs.length);
  return {
    word,
    load(lanes) {
      for (let j = 0; j < H.cols; j++) {
        received[j] = (received[j]! & ~lanes) | (word[j]! & lanes);
        for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++)
          toCheck[t] = (toCheck[t]! & ~lanes) | (received[j]! & lanes);
      }
    },
    iterate(lanes) {
      checkSum.fill(0);
      for (let t = 0; t < toCheck.length; t++) checkSum[checks[t]!]! ^= toCheck[t]!;
      for (let j = 0; j < H.cols; j++) {
        const y = received[j]!;
        const from = bitStart[j]!;
        const degree = degrees[j]!;
        for (let t = 0; t < degree; t++) differs[t] = checkSum[checks[from + t]!]! ^ toCheck[from + t]! ^ y;
        counter.count(differs, degree);
        word[j] = y ^ counter.atLeast((degree + 1) >> 1);
        // D less one where the message itself differs is at least b: D is above b, or is b and the message agrees.
        const reaches = counter.atLeast(thresholds[j]!);
        const passes = counter.atLeast(thresholds[j]! + 1);
        for (let t = 0; t < degree; t++) toCheck[from + t] = y ^ (passes | (reaches & ~differs[t]!));
      }
      return lanes;
    },
  };
}

/** A count in each lane, held as one word for each of its binary digits. */
function laneCounter(most: number) {
  const digits = 32 - Math.clz32(most);
  const limit = 2 ** digits;
  const planes = new Int32Array(Math.max(2, digits));
  const carryFrom = (lanes: number, digit: number) => {
    let carry = lanes;
    for (let k = digit; carry !== 0; k++) {
      const plane = planes[k]!;
      planes[k] = plane ^ carry;
      carry &= plane;
    }
  };
  return {
    /** Counts the first `size` votes in each lane, two at a time by a full adder on the lowest digit. */
    count(votes: Int32Array, size: number): void {
      for (let k = 2; k < digits; k++) planes[k] = 0;
      let ones = 0;
      let twos = 0;
      for (let t = 0; t < size; t += 2) {
        const a = votes[t]!;
        const b = t + 1 < size ? votes[t + 1]! : 0;
        const either = ones ^ a;
        const carry = (ones & a) | (either & b);
        ones = either ^ b;
        const higher = twos & carry;
        twos ^= carry;
        if (higher !== 0) carryFrom(higher, 2);
      }
      planes[0] = ones;
      planes[1] = twos;
    },
    /** The lanes whose count is at least b: from the lowest digit up, what is set decides unless a higher one differs. */
    atLeast(b: number): number {
      if (b >= limit) return 0;
      let lanes = -1;
      for (let k = 0; k < digits; k++) lanes = (b >>> k) & 1 ? planes[k]! & lanes : planes[k]! | lanes;
      return lanes;
    },
  };
}
