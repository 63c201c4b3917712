import { z } from 'zod';
import { primePowersUpTo } from '../../algebra/integers.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { affineFlats } from '../geometry/flats.ts';
import { requirePlaneOrder } from '../geometry/plane-order.ts';
import { exactly } from '../partial-linear-prediction.ts';
import { rankOfAffineFlats } from './affine-geometry.ts';

/** Largest order built: 16,384 points and 2.1 million incidences. */
const MAX_AFFINE_ORDER = 128;

/** AG(2,q) with its q + 1 parallel classes of q lines; the last point is the origin, the others are powers of a
 *  primitive element of GF(q²). Source: Dembowski 1968, section 3.2. */
export const affinePlane = defineFamily({
  id: 'affine-plane',
  title: 'Affine plane AG(2,q)',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_AFFINE_ORDER}`,
      example: 8,
    },
  ],
  source: { authors: 'P. Dembowski', year: 1968, title: 'Finite Geometries', where: 'Springer', part: 'Section 3.2' },
  schema: z.strictObject({ q: z.number().int().min(2) }),
  require: ({ q }) => requirePlaneOrder(q, MAX_AFFINE_ORDER),
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_AFFINE_ORDER)) if (q * q <= maxPoints && q * q + q <= maxBlocks) yield { q };
  },
  predict: ({ q }) => predictAffinePlane(q),
  build: ({ q }) => affineFlats(2, q, 1),
});

function predictAffinePlane(q: number): DesignPrediction {
  const counts = { v: q * q, b: q * q + q, k: q, r: q + 1, lambda: 1 };
  const rank = rankOfAffineFlats({ m: 2, q, flat: 1 });
  const codes = predictFlatCodes(counts, { rank, structure: { blocks: 'none', points: 'none' } });
  return {
    t: 2,
    ...counts,
    resolvable: true,
    codes: codes.map((code) => ({ ...code, distance: distanceOf(q, code.checks) ?? code.distance })),
  };
}

/** Even q. Points as bits: a hyperoval that misses the line at infinity has q + 2 points, the bound of q + 1 orthogonal
 *  checks. Lines as bits: a dual hyperoval holding that line, less it, has q + 1 lines, the bound of q orthogonal checks. */
function distanceOf(q: number, checks: 'blocks' | 'points'): Graded<Enclosure> | undefined {
  if (q % 2 !== 0) return undefined;
  return checks === 'blocks'
    ? exactly(q + 2, 'proved', 'q + 1 orthogonal checks a bit; a hyperoval that misses the line at infinity')
    : exactly(q + 1, 'proved', 'q orthogonal checks a bit; a dual hyperoval less the line at infinity');
}
