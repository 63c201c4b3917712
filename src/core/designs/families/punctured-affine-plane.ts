import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { developBaseBlock } from '../geometry/cyclic-design.ts';
import { requirePlaneOrder } from '../geometry/plane-order.ts';
import { boseDifferenceSet } from '../geometry/singer.ts';
import { exactly, predictPartialLinearCodes } from '../partial-linear-prediction.ts';
import { MAX_PLANE_ORDER } from './projective-plane.ts';

/** The lines of AG(2,q) that miss the origin, on the q² − 1 other points: the type-I Euclidean-geometry code. Points are
 *  residues modulo q² − 1, lines the translates of a relative difference set. Two points on a line through the origin
 *  are on no block.
 *  Source: Kou, Lin, Fossorier 2001, section III. */
export const puncturedAffinePlane = defineFamily({
  id: 'punctured-affine-plane',
  title: 'Affine plane without the origin',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_PLANE_ORDER}`,
      example: 32,
    },
  ],
  source: {
    authors: 'Y. Kou, S. Lin, M. P. C. Fossorier',
    year: 2001,
    title: 'Low-density parity-check codes based on finite geometries: a rediscovery and new results',
    where: 'IEEE Trans. Inf. Theory 47, 2711–2736',
    part: 'Section III',
  },
  schema: z.strictObject({ q: z.number().int().min(2) }),
  require: ({ q }) => requirePlaneOrder(q, MAX_PLANE_ORDER),
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_PLANE_ORDER)) if (q * q - 1 <= Math.min(maxPoints, maxBlocks)) yield { q };
  },
  predict: ({ q }) => predictPuncturedPlane(q),
  build: ({ q }) => {
    const base = boseDifferenceSet(q, 2);
    if (base.length !== q) throw new Error(`a line of AG(2,${q}) has ${q} points, not ${base.length}`);
    return developBaseBlock(q * q - 1, base);
  },
});

function predictPuncturedPlane(q: number): DesignPrediction {
  const n = q * q - 1;
  const counts = { v: n, b: n, k: q, r: q };
  const distance = distanceOfTypeOneCode(q);
  const codes = predictPartialLinearCodes(counts, {
    girth: 6,
    rank: rankOfTypeOneCode(q),
    structure: { blocks: 'cyclic', points: 'cyclic' },
    distance: { blocks: distance, points: distance },
  });
  return { t: 1, ...counts, lambda: q, partialLinear: true, cyclic: true, codes };
}

/** Even q = 2^s: 3^s − 1 (Kou, Lin, Fossorier 2001, from Smith 1969). Odd q: all of it. With B the parallelism of the lines,
 *  N·Nᵀ = qI + J − B; classes have q − 1 lines, an even number, so (J + B)² = 0 and (I + J + B)² = I modulo 2. */
function rankOfTypeOneCode(q: number): Graded<Enclosure> {
  const { p, m } = primePowerOf(q)!;
  if (p !== 2) return exactly(q * q - 1, 'proved', 'N·Nᵀ squares to the identity modulo 2 when q is odd');
  return exactly(3 ** m - 1, 'proved', '3^s − 1 (Kou, Lin, Fossorier 2001, after Smith 1969)', {
    authors: 'K. J. C. Smith',
    year: 1969,
    title: 'On the p-rank of the incidence matrix of points and hyperplanes in a finite projective geometry',
    where: 'J. Combin. Theory 7, 122–129',
  });
}

/** Even q: q orthogonal checks a bit; a hyperoval through the origin, less the origin, is a word of weight q + 1. */
function distanceOfTypeOneCode(q: number): Graded<Enclosure> {
  if (q % 2 === 1) return exactly(0, 'proved', 'the code holds only the zero word');
  return exactly(q + 1, 'proved', 'q orthogonal checks a bit; a hyperoval through the origin, less the origin');
}
