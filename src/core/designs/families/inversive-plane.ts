import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { InfeasibleError, ParamError } from '../../errors.ts';
import { defineFamily } from '../family.ts';
import { circleCounts, predictCircles } from '../geometry/circle-prediction.ts';
import { sphericalBlocks } from '../geometry/circles.ts';
import { requirePlaneOrder } from '../geometry/plane-order.ts';

const MAX_INVERSIVE_ORDER = 32;

/** The Miquelian inversive plane of order q, an S(3, q+1, q²+1). Source: Witt 1938; Dembowski 1968, chapter 6. */
export const inversivePlane = defineFamily({
  id: 'inversive-plane',
  title: 'Inversive plane',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_INVERSIVE_ORDER}`,
      example: 5,
    },
  ],
  source: { authors: 'P. Dembowski', year: 1968, title: 'Finite Geometries', where: 'Springer', part: 'Chapter 6' },
  schema: z.strictObject({ q: z.number().int().min(2) }),
  require: ({ q }) => requireInversiveOrder(q),
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_INVERSIVE_ORDER)) {
      const { v, b } = circleCounts(q, 2);
      if (v <= maxPoints && b <= maxBlocks) yield { q };
    }
  },
  predict: ({ q }) => predictCircles(q, 2),
  build: ({ q }) => sphericalBlocks(q, 2),
});

/** The blocks on one point of an inversive plane form an affine plane of its order, so what forbids that forbids this;
 *  one of even order has a power of two as its order (Dembowski 1964). */
function requireInversiveOrder(q: number): void {
  if (q <= 1e6 && q % 2 === 0 && primePowerOf(q) === null) {
    throw new InfeasibleError(
      'dembowski-even-order',
      `No inversive plane of order ${q} exists: one of even order arises from an ovoid, so its order is a power of two.`,
      {
        authors: 'P. Dembowski',
        year: 1964,
        title: 'Möbiusebenen gerader Ordnung',
        where: 'Math. Ann. 157, 179–205',
      },
      'q',
    );
  }
  if (q <= MAX_INVERSIVE_ORDER && primePowerOf(q) === null) {
    throw new ParamError('q', q, `a prime power from 2 to ${MAX_INVERSIVE_ORDER}`);
  }
  requirePlaneOrder(q, MAX_INVERSIVE_ORDER);
}
