import { gaussianBinomial } from '../../algebra/integers.ts';
import type { DesignSpec } from '../../designs/block-design.ts';
import type { Citation } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';
import type { AnalysableCode } from '../analyse-ldpc.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { overlapsOf } from './spectrum/overlaps.ts';
import type { TannerOrbits } from './tanner-orbits.ts';
import { columnWeightProfile } from './weights.ts';

const massey1963: Citation = {
  authors: 'J. L. Massey',
  year: 1963,
  title: 'Threshold Decoding',
  where: 'MIT Press',
  part: 'Theorem 1',
};

const rudolph1967: Citation = {
  authors: 'L. D. Rudolph',
  year: 1967,
  title: 'A class of majority logic decodable codes',
  where: 'IEEE Trans. Inf. Theory 13, 305–307',
};

const reed1954: Citation = {
  authors: 'I. S. Reed',
  year: 1954,
  title: 'A class of multiple-error-correcting codes and the decoding scheme',
  where: 'IRE Trans. Inf. Theory 4, 38–49',
  part: 'for flats of geometries: Lin and Costello, Error Control Coding, 2nd ed. 2004, sections 8.5 to 8.8',
};

/** Errors that one vote among the checks of each bit always corrects: ⌊J/(2λ)⌋ for J checks a bit, of which another bit
 *  meets λ at most. With λ = 1 the checks are orthogonal. */
export function oneStepRadius(H: SparseMatrix, girth: number, orbits: TannerOrbits): Graded<number> {
  const least = columnWeightProfile(H)[0]?.[0] ?? 0;
  if (girth >= 6) {
    const method = `${least} orthogonal checks on every bit`;
    return { value: Math.floor(least / 2), grade: 'proved', method, source: massey1963 };
  }
  const overlaps = overlapsOf(H);
  let most = 1;
  for (const c of orbits.columns.representatives) {
    overlaps.row(c).forEach((common, d) => {
      if (d !== c && common > most) most = common;
    });
  }
  const method = `each other error spoils at most ${most} of ${least} votes`;
  return { value: Math.floor(least / (2 * most)), grade: 'proved', method, source: rudolph1967 };
}

export interface MajoritySteps {
  /** In the order of decoding: sums of errors on the flats of `dimension` are voted from `orthogonal` flats one dimension
   *  larger, which meet in that flat alone; dimension 0 are the bits themselves. */
  steps: { dimension: number; orthogonal: number }[];
  /** Errors always corrected: half of the least number of orthogonal sums, rounded down. */
  radius: number;
}

/** Reed's decoding step by step for checks on the d-flats of a geometry: the syndrome gives the sums of errors on d-flats,
 *  a vote among the d-flats on each (d − 1)-flat its sum, and so on down to points; d steps. (q^(m−d+1) − 1)/(q − 1) flats
 *  pass a (d − 1)-flat, one fewer when those through the origin are left out. Null for other codes. */
export function multiStepMajority(code: AnalysableCode): Graded<MajoritySteps> | null {
  const plain = (code.transforms?.length ?? 0) === 0;
  const geometry = plain && code.design && code.checks ? geometryOf(code.design, code.checks) : null;
  if (!geometry) return null;
  const { m, q, flat, withoutOrigin } = geometry;
  const steps = Array.from({ length: flat }, (_, i) => {
    const dimension = flat - 1 - i;
    const through = gaussianBinomial(m - dimension, 1, q);
    return { dimension, orthogonal: withoutOrigin ? through - 1 : through };
  });
  const radius = Math.floor(Math.min(...steps.map(({ orthogonal }) => orthogonal)) / 2);
  const method = `${flat === 1 ? 'one step' : `${flat} steps`} of voting, ${steps.map((s) => s.orthogonal).join(', then ')} orthogonal sums`;
  return { value: { steps, radius }, grade: 'proved', method, source: reed1954 };
}

function geometryOf(
  { family, params }: DesignSpec,
  checks: 'blocks' | 'points',
): { m: number; q: number; flat: number; withoutOrigin: boolean } | null {
  const { m, q, flat, origin } = params;
  if (typeof q !== 'number') return null;
  if (family === 'projective-plane') return { m: 2, q, flat: 1, withoutOrigin: false };
  if (family === 'affine-plane' && checks === 'blocks') return { m: 2, q, flat: 1, withoutOrigin: false };
  if (family === 'punctured-affine-plane') return { m: 2, q, flat: 1, withoutOrigin: true };
  if (typeof m !== 'number' || typeof flat !== 'number') return null;
  const projective = family === 'projective-geometry';
  // A correlation exchanges the points and the hyperplanes of PG(m,q).
  if (checks === 'points' && !(projective && flat === m - 1)) return null;
  if (!projective && family !== 'affine-geometry') return null;
  return { m, q, flat, withoutOrigin: origin === 'without' };
}
