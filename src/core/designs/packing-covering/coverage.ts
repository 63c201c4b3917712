import { johnsonPackingBound } from '../../bounds/johnson-bound.ts';
import { schonheimBound } from '../../bounds/schonheim-bound.ts';
import type { BlockDesign } from '../block-design.ts';
import { coverageOf } from '../verify.ts';

export interface CoverageReport {
  blocks: number;
  /** Most blocks a packing can have, or fewest a covering can have, by the bound named. */
  bound: number;
  boundName: string;
  /** blocks / bound: 1 when the bound is met. */
  density: number;
  holds: boolean;
  /** t-subsets in 0, 1, 2, … blocks. */
  histogram: number[];
}

/** Johnson's bound on the blocks of a t-(v,k,1) packing; one less for t = 2, k = 3, v ≡ 5 (mod 6), where the bound
 *  would leave a single edge uncovered though every degree is even (Schönheim 1966; Spencer 1968). */
export function packingBound(t: number, k: number, v: number): number {
  const johnson = johnsonPackingBound(v, 2 * (k - t + 1), k);
  return t === 2 && k === 3 && v % 6 === 5 ? johnson - 1 : johnson;
}

/** Whether no t-subset lies in two blocks, and how near the number of blocks comes to Johnson's bound. */
export function reportPacking(design: BlockDesign, t: number, k: number): CoverageReport {
  const histogram = histogramOf(design, t);
  const bound = packingBound(t, k, design.v);
  return {
    blocks: design.b,
    bound,
    boundName: 'Johnson',
    density: design.b / bound,
    holds: histogram.length <= 2,
    histogram,
  };
}

/** Whether every t-subset lies in a block, and how near the number of blocks comes to Schönheim's bound. */
export function reportCovering(design: BlockDesign, t: number, k: number): CoverageReport {
  const histogram = histogramOf(design, t);
  const bound = schonheimBound(design.v, k, t);
  return {
    blocks: design.b,
    bound,
    boundName: 'Schönheim',
    density: design.b / bound,
    holds: histogram[0] === 0,
    histogram,
  };
}

function histogramOf(design: BlockDesign, t: number): number[] {
  const histogram: number[] = [];
  for (const count of coverageOf(design, t).counts) histogram[count] = (histogram[count] ?? 0) + 1;
  return Array.from(histogram, (count) => count ?? 0);
}
