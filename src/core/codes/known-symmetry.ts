import type { BlockDesign, Symmetry } from '../designs/block-design.ts';
import { buildDesign } from '../designs/design.ts';
import { circulantOf } from '../gf2/cyclic.ts';
import type { AnalysableCode } from './analyse-ldpc.ts';
import { symmetryOf } from './analysis/tanner-orbits.ts';
import type { SparseMatrix } from './sparse-matrix.ts';

/** What the permutations of a design's points that it was given with do to the columns of its matrix: themselves where
 *  points are bits, the permutations of the blocks where blocks are. Of a circulant nothing is told, since its shift,
 *  found in the matrix, moves every column to every other already. */
export function columnSymmetryOf(
  { symmetry = [], v, b, blockStart, blockPoints }: BlockDesign,
  checks: 'blocks' | 'points',
): Symmetry[] | undefined {
  if (symmetry.length === 0 || checks === 'blocks') return symmetry.length === 0 ? undefined : symmetry;
  const incidence: SparseMatrix = { rows: b, cols: v, rowStart: blockStart, colIndex: blockPoints };
  if (circulantOf(incidence)) return undefined;
  const onBlocks = symmetry.flatMap(({ order, pointPerm }) => {
    const found = symmetryOf(incidence, pointPerm);
    return found ? [{ order, pointPerm: found.rows }] : [];
  });
  return onBlocks.length > 0 ? onBlocks : undefined;
}

/** The same of a kept code, whose stored matrix does not carry it: the design is built anew. Nothing is known of uploads,
 *  nor after transforms. Whoever uses it checks it against the matrix, as tannerOrbits does. */
export function knownSymmetry({ H, design, checks, transforms, columnSymmetry }: AnalysableCode): readonly Symmetry[] {
  if (columnSymmetry) return columnSymmetry;
  if (!design || !checks || (transforms?.length ?? 0) > 0 || circulantOf(H)) return [];
  return columnSymmetryOf(buildDesign(design), checks) ?? [];
}
