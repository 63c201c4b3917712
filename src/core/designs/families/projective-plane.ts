import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { developBaseBlock } from '../geometry/cyclic-design.ts';
import { requirePlaneOrder } from '../geometry/plane-order.ts';
import { singerDifferenceSet } from '../geometry/singer.ts';
import { exactly } from '../partial-linear-prediction.ts';

/** Largest order built: 65,793 points and 16.9 million incidences. */
export const MAX_PLANE_ORDER = 256;

/** PG(2,q) in Singer order: points are residues modulo q² + q + 1, lines the translates of a perfect difference set.
 *  Source: Singer 1938. @throws InfeasibleError for orders that Bruck–Ryser or the order-ten search exclude. */
export const projectivePlane = defineFamily({
  id: 'projective-plane',
  title: 'Projective plane PG(2,q)',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_PLANE_ORDER}`,
      example: 16,
    },
  ],
  source: {
    authors: 'J. Singer',
    year: 1938,
    title: 'A theorem in finite projective geometry and some applications to number theory',
    where: 'Trans. Amer. Math. Soc. 43, 377–385',
  },
  schema: z.strictObject({ q: z.number().int().min(2) }),
  require: ({ q }) => requirePlaneOrder(q, MAX_PLANE_ORDER),
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_PLANE_ORDER)) if (q * q + q + 1 <= Math.min(maxPoints, maxBlocks)) yield { q };
  },
  predict: ({ q }) => predictPlane(q),
  build: ({ q }) => {
    const base = singerDifferenceSet(q, 2);
    if (base.length !== q + 1) throw new Error(`a line of PG(2,${q}) has ${q + 1} points, not ${base.length}`);
    return developBaseBlock(q * q + q + 1, base);
  },
});

function predictPlane(q: number): DesignPrediction {
  const n = q * q + q + 1;
  const counts = { v: n, b: n, k: q + 1, r: q + 1, lambda: 1 };
  const distance = distanceOfPlaneCode(q);
  const codes = predictTwoDesignCodes(counts, {
    rank: rankOfPlane(q),
    structure: 'cyclic',
    distance: { blocks: distance, points: distance },
    orientations: ['blocks', 'points'],
  });
  return { t: 2, ...counts, cyclic: true, codes };
}

/** Even q = 2^s: 3^s + 1 (Graham and MacWilliams 1966). Odd q: the q² + q that any plane of odd order has, since
 *  N·Nᵀ = qI + J, whose kernel modulo 2 holds only the all-one vector. */
function rankOfPlane(q: number): Graded<Enclosure> {
  const { p, m } = primePowerOf(q)!;
  if (p !== 2) return exactly(q * q + q, 'proved', 'N·Nᵀ = I + J modulo 2 when q is odd');
  return exactly(3 ** m + 1, 'proved', '3^s + 1 (Graham and MacWilliams 1966)', {
    authors: 'R. L. Graham, J. MacWilliams',
    year: 1966,
    title: 'On the number of information symbols in difference-set cyclic codes',
    where: 'Bell Syst. Tech. J. 45, 1057–1070',
  });
}

/** Even q: q + 1 orthogonal checks a bit give q + 2 at least, and a hyperoval (a conic with its nucleus; Bose 1947) is
 *  a word of that weight. Odd q: the only word but zero is the all-one word. */
function distanceOfPlaneCode(q: number): Graded<Enclosure> {
  if (q % 2 === 1) return exactly(q * q + q + 1, 'proved', 'the all-one word is the only word but zero');
  return exactly(q + 2, 'proved', 'q + 1 orthogonal checks a bit; a hyperoval has q + 2 points');
}
