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

const calkinKeyDeResmini1999: Citation = {
  authors: 'N. J. Calkin, J. D. Key, M. J. de Resmini',
  year: 1999,
  title: 'Minimum weight and dimension formulas for some geometric codes',
  where: 'Des. Codes Cryptogr. 17, 105–120',
  part: 'the dual of the binary code of points and t-flats of PG(m,q) or AG(m,q), q even, has distance (q + 2)q^(m−t−1)',
};

const payneThas2009: Citation = {
  authors: 'S. E. Payne, J. A. Thas',
  year: 2009,
  title: 'Finite Generalized Quadrangles',
  where: 'EMS, 2nd ed.',
  part: '1.3 and 3.3.1: for regular points the traces {x,y}^⊥ and {x,y}^⊥⊥ have t + 1 points each',
};

/** Exact distance where a theorem gives it: planes and flats of geometries of even order, and the classical generalised
 *  quadrangles with regular points. Null where no theorem here applies. */
export function geometryDistance(design: DesignSpec | undefined, checks: 'blocks' | 'points'): Graded<number> | null {
  if (!design) return null;
  return planeDistance(design, checks) ?? flatDistance(design, checks) ?? quadrangleDistance(design, checks);
}

const proved = (value: number, method: string, source: Citation): Graded<number> => ({
  value,
  grade: 'proved',
  method,
  source,
});

const isPowerOfTwo = (q: unknown): q is number => typeof q === 'number' && q >= 2 && Number.isInteger(Math.log2(q));

/** One-step orthogonality gives the lower bound; a hyperoval is a word of that weight. */
function planeDistance({ family, params }: DesignSpec, checks: 'blocks' | 'points'): Graded<number> | null {
  const { q } = params;
  if (!isPowerOfTwo(q)) return null;
  switch (family) {
    case 'projective-plane':
      // The plane over a field is its own dual, so both orientations give the same code.
      return proved(q + 2, 'hyperoval of a plane of even order', bose1947);
    case 'affine-plane':
      // A hyperoval misses q(q − 1)/2 lines; send one of them to infinity.
      return checks === 'blocks' ? proved(q + 2, 'hyperoval that misses the line at infinity', bose1947) : null;
    case 'punctured-affine-plane':
      return proved(q + 1, 'hyperoval through the origin, less the origin', bose1947);
    default:
      return null;
  }
}

/** Checks on the flats; on the points too for hyperplanes of PG(m,q), which a correlation exchanges with points. */
function flatDistance({ family, params }: DesignSpec, checks: 'blocks' | 'points'): Graded<number> | null {
  const { m, q, flat, origin } = params;
  if (!isPowerOfTwo(q) || typeof m !== 'number' || typeof flat !== 'number') return null;
  const projective = family === 'projective-geometry';
  if (!projective && family !== 'affine-geometry') return null;
  if (checks === 'points' && !(projective && flat === m - 1)) return null;
  const distance = (q + 2) * q ** (m - flat - 1);
  const cone = flat === m - 1 ? 'hyperoval' : 'hyperoval times a flat';
  if (origin !== 'without') return proved(distance, `${cone}, (q + 2)q^(m − t − 1)`, calkinKeyDeResmini1999);
  // Words on the other points orthogonal to the flats that miss the origin are the words of the whole code less their
  // origin: both have the same dimension. Translations move every point to the origin.
  return proved(distance - 1, `${cone} through the origin, less the origin`, calkinKeyDeResmini1999);
}

/** Girth 8 gives 2(t + 1) from below. For a regular pair of points every line that meets {x,y}^⊥ or {x,y}^⊥⊥ meets
 *  each in one point, so the two together are a word of that weight. Points of W(q) and of H(3,q²) are regular, as are
 *  lines of Q(4,q), and for even q the points of Q(4,q), isomorphic to W(q), too. */
function quadrangleDistance({ family, params }: DesignSpec, checks: 'blocks' | 'points'): Graded<number> | null {
  const { kind, q } = params;
  if (family !== 'generalised-quadrangle' || typeof q !== 'number') return null;
  const selfDual = q % 2 === 0 && (kind === 'W' || kind === 'Q4');
  const regular = checks === 'blocks' ? kind === 'W' || kind === 'H3' : kind === 'Q4';
  if (!regular && !selfDual) return null;
  return proved(2 * (q + 1), 'two traces of a regular pair; girth 8 from below', payneThas2009);
}
