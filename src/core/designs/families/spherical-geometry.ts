import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import { defineFamily } from '../family.ts';
import { circleCounts, predictCircles } from '../geometry/circle-prediction.ts';
import { sphericalBlocks } from '../geometry/circles.ts';

const MAX_SPHERE_POINTS = 1100;

/** The spherical geometry S(3, q+1, q^d+1). For q = 2 it is every triple, so q starts at 3.
 *  Source: Witt 1938; Hanani 1979 for its place among the 3-designs. */
export const sphericalGeometry = defineFamily({
  id: 'spherical-geometry',
  title: 'Spherical geometry S(3, q+1, q^d+1)',
  params: [
    { name: 'q', label: 'circle order q', kind: 'integer', accepted: 'a prime power from 3 up', example: 3 },
    { name: 'd', label: 'degree d', kind: 'integer', accepted: 'an integer from 2 to 6', example: 3 },
  ],
  source: {
    authors: 'E. Witt',
    year: 1938,
    title: 'Über Steinersche Systeme',
    where: 'Abh. Math. Sem. Univ. Hamburg 12, 265–275',
  },
  schema: z.strictObject({ q: z.number().int().min(3).max(100_000), d: z.number().int().min(2).max(6) }),
  require: ({ q, d }) => {
    if (!primePowerOf(q)) throw new ParamError('q', q, 'a prime power from 3 up');
    if (q ** d + 1 > MAX_SPHERE_POINTS) throw new LimitError('a sphere', q ** d + 1, MAX_SPHERE_POINTS, 'points');
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(32)) {
      // d = 2 is the inversive plane, a family of its own.
      for (let d = 3; q >= 3 && q ** d + 1 <= Math.min(maxPoints, MAX_SPHERE_POINTS); d++) {
        if (circleCounts(q, d).b <= maxBlocks) yield { q, d };
      }
    }
  },
  predict: ({ q, d }) => predictCircles(q, d),
  build: ({ q, d }) => sphericalBlocks(q, d),
});
