import { z } from 'zod';
import type { BlockDesign, DesignSpec, Symmetry } from '../designs/block-design.ts';
import { ParamError } from '../errors.ts';
import { columnSymmetryOf } from './known-symmetry.ts';
import { type SparseMatrix, transpose } from './sparse-matrix.ts';
import { applyTransforms } from './transforms/registry.ts';

/** A step from one matrix to the next; each kind is one file in transforms/. */
export interface Transform {
  kind: string;
  [param: string]: unknown;
}

export const derivationSchema = z.object({
  kind: z.literal('ldpc'),
  checks: z.enum(['blocks', 'points']),
  transforms: z
    .array(z.looseObject({ kind: z.string() }))
    .max(12)
    .optional(),
});

/** A low-density parity-check code: the matrix, and where it came from. */
export interface LdpcCode {
  H: SparseMatrix;
  checks: 'blocks' | 'points';
  design?: DesignSpec;
  transforms: Transform[];
  /** Permutations of the columns that map the set of rows onto itself, when known. */
  columnSymmetry?: Symmetry[];
}

/** The parity-check matrix of a design: its incidence matrix, or the transpose.
 *  `checks: 'blocks'` gives b rows and v columns, `checks: 'points'` v rows and b columns.
 *  Transforms are then applied in order; what was known of the design's symmetry does not outlive them.
 *  @throws ParamError on an unknown orientation, and as the transforms do. */
export function deriveLdpc(
  design: BlockDesign,
  options: { checks: 'blocks' | 'points'; transforms?: Transform[] },
): LdpcCode {
  const incidence: SparseMatrix = {
    rows: design.b,
    cols: design.v,
    rowStart: design.blockStart,
    colIndex: design.blockPoints,
  };
  const { checks } = options;
  if (checks !== 'blocks' && checks !== 'points') throw new ParamError('checks', checks, '"blocks" or "points"');
  const H = checks === 'blocks' ? incidence : transpose(incidence);
  const transforms = options.transforms ?? [];
  const classes = checks === 'blocks' ? { rowClasses: design.classes } : { columnClasses: design.classes };
  return {
    H: applyTransforms({ H, ...classes }, transforms).H,
    checks,
    design: design.spec,
    transforms: [...transforms],
    columnSymmetry: transforms.length === 0 ? columnSymmetryOf(design, checks) : undefined,
  };
}
