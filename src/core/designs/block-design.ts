import { ParamError } from '../errors.ts';

/** What to build: a family's id and its parameters; operations are families whose parameters hold an inner spec. */
export interface DesignSpec {
  family: string;
  params: Record<string, number | string | DesignSpec | number[]>;
}

/** A generator of an automorphism group: the permutation of the points, and the order of the group it generates. */
export interface Symmetry {
  order: number;
  pointPerm: Uint32Array;
}

/** Points 0..v−1 and b blocks; block i is blockPoints[blockStart[i] .. blockStart[i+1]), ascending. */
export interface BlockDesign {
  v: number;
  b: number;
  /** b + 1 offsets into blockPoints. */
  blockStart: Uint32Array;
  blockPoints: Uint32Array;
  /** Resolution (parallel) class of each block, when the construction gives one. */
  classes?: Uint32Array;
  /** Known generators of an automorphism group. */
  symmetry?: Symmetry[];
  spec?: DesignSpec;
}

/** Points of block i, a view without a copy. */
export function blockOf(design: BlockDesign, i: number): Uint32Array {
  return design.blockPoints.subarray(design.blockStart[i], design.blockStart[i + 1]);
}

/** Packs lists of points into a design; each block is sorted and may not repeat a point.
 *  @throws ParamError when a point is out of range or repeated. */
export function designFromBlocks(
  v: number,
  blocks: readonly ArrayLike<number>[],
  extra: Pick<BlockDesign, 'classes' | 'symmetry' | 'spec'> = {},
): BlockDesign {
  const blockStart = new Uint32Array(blocks.length + 1);
  for (let i = 0; i < blocks.length; i++) blockStart[i + 1] = blockStart[i]! + blocks[i]!.length;
  const blockPoints = new Uint32Array(blockStart[blocks.length]!);
  for (let i = 0; i < blocks.length; i++) {
    const target = blockPoints.subarray(blockStart[i], blockStart[i + 1]);
    target.set(blocks[i]!);
    target.sort();
    for (let j = 0; j < target.length; j++) {
      if (target[j]! >= v || (j > 0 && target[j] === target[j - 1])) {
        throw new ParamError(`blocks[${i}]`, target[j], `distinct points from 0 to ${v - 1}`);
      }
    }
  }
  return { v, b: blocks.length, blockStart, blockPoints, ...extra };
}
