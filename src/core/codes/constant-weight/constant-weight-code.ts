import { type BlockDesign, blockOf, type DesignSpec } from '../../designs/block-design.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { leastDistance } from './word-distance.ts';

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
  /** Parallel class of each word, when the design came with a resolution. */
  classes?: Uint32Array;
}

/** Ones that the words of a code may hold together. */
export const MAX_ONES = 1e8;

/** Words = blocks of a design whose blocks all have one size.
 *  @throws ParamError when block sizes differ; LimitError when complements would hold too many ones. */
export function deriveConstantWeight(design: BlockDesign, options: { complement?: boolean } = {}): ConstantWeightCode {
  const { v: n, b: M, blockStart, blockPoints } = design;
  const w = M === 0 ? 0 : blockOf(design, 0).length;
  for (let i = 0; i < M; i++) {
    const size = blockStart[i + 1]! - blockStart[i]!;
    if (size !== w) throw new ParamError(`blocks[${i}]`, size, `blocks all of size ${w}`);
  }
  const words: Words = { n, w, M, ones: blockPoints.slice() };
  const extra = { design: design.spec, classes: design.classes };
  if (options.complement === true)
    return codeOf(complementWords(words), { ...extra, complement: true }, leastDistance(words));
  return codeOf(words, { ...extra, complement: false });
}

/** Words of one weight without anything known of them. */
export type Words = Pick<ConstantWeightCode, 'n' | 'w' | 'M' | 'ones'>;

/** A code with its distance, which is computed unless it is known already. */
export function codeOf(
  { n, w, M, ones }: Words,
  extra: Pick<ConstantWeightCode, 'complement' | 'design' | 'classes'>,
  distanceEvidence: Graded<Enclosure> = leastDistance({ n, w, M, ones }),
): ConstantWeightCode {
  return { n, w, M, distance: distanceEvidence.value.lower, distanceEvidence, ones, ...extra };
}

/** Each word with ones and zeros exchanged; all distances stay. */
export function complementWords({ n, w, M, ones }: Words): Words {
  const holes = n - w;
  if (M * holes > MAX_ONES) throw new LimitError('ones of the complements', M * holes, MAX_ONES, 'ones');
  const complement = new Uint32Array(M * holes);
  let at = 0;
  for (let i = 0; i < M; i++) {
    let next = i * w;
    const end = next + w;
    for (let p = 0; p < n; p++) {
      if (next < end && ones[next] === p) next++;
      else complement[at++] = p;
    }
  }
  return { n, w: holes, M, ones: complement };
}

/** Positions of the ones of word i, ascending; a view without a copy. */
export function wordOf({ w, ones }: Pick<Words, 'w' | 'ones'>, i: number): Uint32Array {
  return ones.subarray(i * w, (i + 1) * w);
}

/** Word i is row i: what the nearest-word decoder and its simulation read. */
export function wordMatrix({ n, w, M, ones }: Words): SparseMatrix {
  return { rows: M, cols: n, rowStart: Uint32Array.from({ length: M + 1 }, (_, i) => i * w), colIndex: ones };
}
