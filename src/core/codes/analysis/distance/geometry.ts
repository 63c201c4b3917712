import type { DesignSpec } from '../../../designs/block-design.ts';
import type { Citation } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';

const bose1947: Citation = {
  authors: 'R. C. Bose',
  year: 1947,
  title: 'Mathematical theory of the symmetrical factorial design',
  where: 'Sankhyā 8, 107–166',
  part: 'for q even a conic and its nucleus form q + 2 points that meet every line in 0 or 2 of them',
};

/** Exact distance of the code of points of a Desarguesian plane of even order, checks on the lines. One-step orthogonality
 *  gives the lower bound; a hyperoval is a word of that weight. Null where no theorem here applies. */
export function geometryDistance(design: DesignSpec | undefined, checks: 'blocks' | 'points'): Graded<number> | null {
  const q = design?.params.q;
  if (typeof q !== 'number' || q < 2 || !Number.isInteger(Math.log2(q))) return null;
  const proved = (value: number, method: string): Graded<number> => ({
    value,
    grade: 'proved',
    method,
    source: bose1947,
  });
  switch (design?.family) {
    case 'projective-plane':
      // The plane over a field is its own dual, so both orientations give the same code.
      return proved(q + 2, 'hyperoval of a plane of even order');
    case 'affine-plane':
      // A hyperoval misses q(q − 1)/2 lines; send one of them to infinity.
      return checks === 'blocks' ? proved(q + 2, 'hyperoval that misses the line at infinity') : null;
    case 'punctured-affine-plane':
      return proved(q + 1, 'hyperoval through the origin, less the origin');
    default:
      return null;
  }
}
