import { z } from 'zod';
import { galoisField, subfieldOf } from '../../algebra/galois-field.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { exactly } from '../partial-linear-prediction.ts';

const COUNTS = { v: 28, b: 63, k: 4, r: 9, lambda: 1 };

/** The Ree unital on 28 points, with PΓL(2,8) = R(3) acting. Points are the pairs {z, z⁸} of conjugate elements of GF(64)
 *  outside GF(8); blocks are the pairs that one of the 63 involutions of PSL(2,8) exchanges within, those with
 *  1/(z + c) of given trace to GF(8), or z itself for c = ∞. The seven involutions that fix c give a parallel class.
 *  Source: Lüneburg 1966. */
export const reeUnital = defineFamily({
  id: 'ree-unital',
  title: 'Ree unital on 28 points',
  params: [{ name: 'q', label: 'order q', kind: 'integer', accepted: 'the order 3, the one built here', example: 3 }],
  source: {
    authors: 'H. Lüneburg',
    year: 1966,
    title: 'Some remarks concerning the Ree groups of type (G2)',
    where: 'J. Algebra 3, 256–259',
  },
  schema: z.strictObject({ q: z.literal(3) }),
  *enumerate({ maxPoints, maxBlocks }) {
    if (COUNTS.v <= maxPoints && COUNTS.b <= maxBlocks) yield { q: 3 as const };
  },
  predict: predictReeUnital,
  build: buildReeUnital,
});

/** The pairs are the lines that miss a conic and its nucleus in PG(2,8), the involutions the points off both: an oval
 *  design, of rank 3³ − 2³ (Carpenter 1996). */
function predictReeUnital(): DesignPrediction {
  const rank = exactly(19, 'proved', 'oval design of PG(2,8), 3³ − 2³ (Carpenter 1996)');
  const codes = predictFlatCodes(COUNTS, { rank, structure: { blocks: 'none', points: 'none' } });
  return { t: 2, ...COUNTS, resolvable: true, codes };
}

function buildReeUnital(): BlockDesign {
  const field = galoisField(64);
  const ground = subfieldOf(field, 8);
  const conjugate = (z: number) => field.pow(z, 8);
  const pointOf = new Map<number, number>();
  for (let z = 0; z < 64; z++) {
    if (conjugate(z) === z || pointOf.has(z)) continue;
    const point = pointOf.size / 2;
    pointOf.set(z, point).set(conjugate(z), point);
  }
  const blocks = new BlockList(COUNTS.v, COUNTS.b, COUNTS.k);
  const classes = new Uint32Array(COUNTS.b);
  const moves = [(z: number) => z, ...ground.map((c) => (z: number) => field.inv(field.add(z, c)))];
  moves.forEach((move, parallelClass) => {
    for (const trace of ground.slice(1)) {
      const members = [...pointOf].filter(([z]) => field.add(move(z), conjugate(move(z))) === trace);
      classes[blocks.size] = parallelClass;
      blocks.add([...new Set(members.map(([, point]) => point))]);
    }
  });
  const permutation = (image: (z: number) => number) => {
    const pointPerm = new Uint32Array(COUNTS.v);
    for (const [z, point] of pointOf) pointPerm[point] = pointOf.get(image(z))!;
    return pointPerm;
  };
  const symmetry = [
    { order: 7, pointPerm: permutation((z) => field.mul(ground[2]!, z)) },
    { order: 2, pointPerm: permutation((z) => field.add(z, 1)) },
    { order: 2, pointPerm: permutation((z) => field.inv(z)) },
    { order: 3, pointPerm: permutation((z) => field.mul(z, z)) },
  ];
  return blocks.finish({ classes, symmetry });
}
