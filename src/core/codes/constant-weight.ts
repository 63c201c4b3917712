import { type BlockDesign, blockOf, type DesignSpec } from '../designs/block-design.ts';
import { ParamError } from '../errors.ts';
import type { Enclosure, Graded } from '../evidence.ts';
import { transpose } from './sparse-matrix.ts';

/** A binary code whose M words of length n all hold w ones: the blocks of a design, or their complements. */
export interface ConstantWeightCode {
  n: number;
  w: number;
  M: number;
  /** Least Hamming distance of two words; a lower bound when `distanceEvidence` says bounded. For M < 2 it is 2w, more than
   *  which no pair could have. */
  distance: number;
  distanceEvidence: Graded<Enclosure>;
  /** Word i has its ones at ones[i·w .. (i+1)·w), ascending. */
  ones: Uint32Array;
  design?: DesignSpec;
  complement: boolean;
}

/** Pairs of incident (word, point, word) looked at before the distance is left as a bound. */
export const DISTANCE_WORK_LIMIT = 1e9;

/** Words = blocks of a design whose blocks all have one size.
 *  @throws ParamError when block sizes differ. */
export function deriveConstantWeight(design: BlockDesign, options: { complement?: boolean } = {}): ConstantWeightCode {
  const { v: n, b: M } = design;
  const size = M === 0 ? 0 : blockOf(design, 0).length;
  for (let i = 0; i < M; i++) {
    if (blockOf(design, i).length !== size) {
      throw new ParamError(`blocks[${i}]`, blockOf(design, i).length, `blocks all of size ${size}`);
    }
  }
  const complement = options.complement === true;
  const distanceEvidence = blockDistance(design, size);
  return {
    n,
    w: complement ? n - size : size,
    M,
    distance: distanceEvidence.value.lower,
    distanceEvidence,
    ones: complement ? complementsOf(design, size) : design.blockPoints.slice(),
    design: design.spec,
    complement,
  };
}

/** 2(size − largest intersection of two blocks); complements have the same distances. */
function blockDistance(design: BlockDesign, size: number): Graded<Enclosure> {
  const { v, b, blockStart, blockPoints } = design;
  const byPoint = transpose({ rows: b, cols: v, rowStart: blockStart, colIndex: blockPoints });
  let work = 0;
  for (let p = 0; p < v; p++) work += (byPoint.rowStart[p + 1]! - byPoint.rowStart[p]!) ** 2;
  if (work > DISTANCE_WORK_LIMIT) {
    return { value: { lower: 0, upper: 2 * size }, grade: 'bounded', method: 'not computed: too many pairs of words' };
  }
  const common = new Uint32Array(b);
  let largest = b < 2 ? 0 : Math.max(0, 2 * size - v);
  for (let i = 1; i < b; i++) {
    for (const p of blockOf(design, i)) {
      for (let e = byPoint.rowStart[p]!; byPoint.colIndex[e]! < i; e++) common[byPoint.colIndex[e]!]!++;
    }
    for (const p of blockOf(design, i)) {
      for (let e = byPoint.rowStart[p]!; byPoint.colIndex[e]! < i; e++) {
        const j = byPoint.colIndex[e]!;
        if (common[j]! > largest) largest = common[j]!;
        common[j] = 0;
      }
    }
  }
  const distance = 2 * (size - largest);
  return {
    value: { lower: distance, upper: distance },
    grade: 'computed',
    method: 'intersections of all pairs of blocks',
  };
}

function complementsOf(design: BlockDesign, size: number): Uint32Array {
  const { v, b } = design;
  const ones = new Uint32Array(b * (v - size));
  let at = 0;
  for (let i = 0; i < b; i++) {
    const block = blockOf(design, i);
    let next = 0;
    for (let p = 0; p < v; p++) {
      if (block[next] === p) next++;
      else ones[at++] = p;
    }
  }
  return ones;
}
