import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { flippingThresholds, iterationCap } from '../decoders/settings.ts';
import { columnDegrees, type TannerGraph, tannerGraph } from '../decoders/tanner-graph.ts';
import type { Citation } from '../errors.ts';
import type { Graded } from '../evidence.ts';

/** "1 check", "2 checks". */
const checksText = (count: number): string => (count === 1 ? '1 check' : `${count} checks`);

const massey: Citation = {
  authors: 'J. L. Massey',
  year: 1963,
  title: 'Threshold Decoding',
  where: 'MIT Press',
  part: 'Theorem 1, applied to the votes of one iteration',
};
const orlitsky: Citation = {
  authors: 'A. Orlitsky, R. Urbanke, K. Viswanathan, J. Zhang',
  year: 2002,
  title: 'Stopping sets and the girth of Tanner graphs',
  where: 'IEEE Int. Symp. Inform. Theory',
};

/** The number of errors (erasures, for a decoder of these) of which every pattern is corrected, by a theorem whose
 *  hypotheses are checked on this matrix; null for decoders of which none is known here. Not the largest such number.
 *
 *  Let μ be the most checks that two bits share (1 at girth 6 or more) and t the number of errors. A bit in error lies
 *  in at least d_j − μ(t − 1) failing checks, a right one in at most μ·t. Votes that part the two correct every pattern
 *  in one iteration. */
export function guaranteedRadius(H: SparseMatrix, decoder: DecoderSpec): Graded<number> | null {
  const degrees = columnDegrees(H);
  const shared = mostSharedChecks(tannerGraph(H));
  const value = radiusOf(decoder, degrees, shared);
  if (value === null) return null;
  const erasing = decoder.kind === 'peeling' || decoder.kind === 'elimination';
  return {
    value,
    grade: 'proved',
    method: erasing
      ? `no stopping set among so few bits: any two bits share at most ${checksText(shared)}`
      : `votes of one iteration part the wrong bits from the right: any two bits share at most ${checksText(shared)}`,
    source: erasing ? orlitsky : massey,
  };
}

function radiusOf(decoder: DecoderSpec, degrees: Uint32Array, shared: number): number | null {
  const least = degrees.reduce((low, d) => Math.min(low, d));
  switch (decoder.kind) {
    case 'majority-logic':
      return parted(degrees, shared, (d) => Math.floor(d / 2) + 1);
    case 'bit-flipping': {
      const thresholds = flippingThresholds(degrees, decoder);
      return parted(degrees, shared, (_, j) => thresholds[j]!);
    }
    case 'gallager-a':
    case 'gallager-b':
      // The first messages are the received bits, so that the first decision votes on the syndrome.
      return parted(degrees, shared, (d) => Math.ceil(d / 2));
    case 'gradient-descent': {
      if (decoder.flips === 'single') return null;
      // Δ_j = 1 + d_j − 2·failing in the first iteration, where every bit agrees with the received one.
      const threshold = decoder.threshold ?? -0.5;
      return parted(degrees, shared, (d) => Math.max(0, Math.floor((1 + d - threshold) / 2) + 1));
    }
    case 'bit-flipping-max': {
      // Only wrong bits fail most checks as long as d − μ(t − 1) > μ·t, and at least one is set right an iteration.
      const largest = Math.ceil((least + shared) / (2 * shared)) - 1;
      return Math.min(largest, iterationCap(decoder));
    }
    case 'peeling':
    case 'elimination':
      // Each check of an erased bit holds another erased bit, and such a bit serves μ checks at most.
      return Math.ceil(least / shared);
    case 'two-stage':
      return radiusOf(decoder.stages[0]!, degrees, shared);
    default:
      return null;
  }
}

/** Largest t for which μ·t < θ_j ≤ d_j − μ(t − 1) for every bit; a threshold of 0 would flip right bits always. */
function parted(degrees: Uint32Array, shared: number, threshold: (d: number, j: number) => number): number {
  let radius = Number.POSITIVE_INFINITY;
  degrees.forEach((d, j) => {
    const theta = threshold(d, j);
    const rightStay = Math.ceil(theta / shared) - 1;
    const wrongGo = Math.floor((d - theta) / shared) + 1;
    radius = Math.min(radius, rightStay, Math.max(0, wrongGo));
  });
  return Math.max(0, radius);
}

/** The most checks that any two bits have in common; at least 1, which changes no bound. */
export function mostSharedChecks({ H, edgeCheck, bitStart, bitEdges }: TannerGraph): number {
  const count = new Uint32Array(H.cols);
  let most = 1;
  for (let j = 0; j < H.cols; j++) {
    const touched: number[] = [];
    for (let t = bitStart[j]!; t < bitStart[j + 1]!; t++) {
      const check = edgeCheck[bitEdges[t]!]!;
      for (let e = H.rowStart[check]!; e < H.rowStart[check + 1]!; e++) {
        const other = H.colIndex[e]!;
        if (other <= j) continue;
        if (count[other]! === 0) touched.push(other);
        count[other]! += 1;
        most = Math.max(most, count[other]!);
      }
    }
    for (const other of touched) count[other] = 0;
  }
  return most;
}
