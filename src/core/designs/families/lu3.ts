import { z } from 'zod';
import { galoisField } from '../../algebra/galois-field.ts';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { exactly, predictPartialLinearCodes } from '../partial-linear-prediction.ts';
import { rankOfSymplectic } from './generalised-quadrangle.ts';

const MAX_ORDER = 46;

/** LU(3,q): points (a, b, c), blocks [x, y, z], incident when y = ax + b and z = ay + c. q-regular of girth 8; blocks
 *  with one x are a parallel class. Point (a, b, c) is a·q² + b·q + c, and blocks are numbered alike.
 *  Source: Lazebnik and Ustimenko 1997; Kim, Peled, Perepelitsa, Pless, Friedland 2004 for the codes. */
export const lu3 = defineFamily({
  id: 'lu3',
  title: 'LU(3,q) graph',
  params: [
    { name: 'q', label: 'order q', kind: 'integer', accepted: `a prime power from 2 to ${MAX_ORDER}`, example: 5 },
  ],
  source: {
    authors: 'F. Lazebnik, V. A. Ustimenko',
    year: 1997,
    title: 'Explicit construction of graphs with an arbitrary large girth and of large size',
    where: 'Discrete Appl. Math. 60, 275–284',
  },
  schema: z.strictObject({ q: z.number().int().min(2).max(100_000) }),
  require: ({ q }) => {
    if (!primePowerOf(q)) throw new ParamError('q', q, `a prime power from 2 to ${MAX_ORDER}`);
    if (q > MAX_ORDER) throw new LimitError(`LU(3,${q})`, q ** 3, MAX_ORDER ** 3, 'points');
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_ORDER)) if (q ** 3 <= Math.min(maxPoints, maxBlocks)) yield { q };
  },
  predict: ({ q }) => predictGraph(q),
  build: ({ q }) => buildGraph(q),
});

function predictGraph(q: number): DesignPrediction {
  const counts = { v: q ** 3, b: q ** 3, k: q, r: q };
  // For a prime q, adding one to c and to z moves runs of q points and of q blocks on by one: q × q circulants.
  const structure = primePowerOf(q)!.m === 1 ? 'quasi-cyclic' : 'none';
  const codes = predictPartialLinearCodes(counts, {
    girth: 8,
    rank: rankOfGraph(q),
    structure: { blocks: structure, points: structure },
  });
  return { t: 1, ...counts, lambda: q, partialLinear: true, resolvable: true, codes };
}

/** The rank of W(q) less 2q: Sin and Xiang 2006 for odd q, Arslan 2009 for even q. */
function rankOfGraph(q: number): Graded<Enclosure> {
  const quadrangle = rankOfSymplectic(q).value.lower;
  const method = 'rank of W(q) less 2q';
  return q % 2 === 1
    ? exactly(quadrangle - 2 * q, 'proved', `${method} (Sin and Xiang 2006)`, {
        authors: 'P. Sin, Q. Xiang',
        year: 2006,
        title: 'On the dimensions of certain LDPC codes based on q-regular bipartite graphs',
        where: 'IEEE Trans. Inf. Theory 52, 3735–3737',
      })
    : exactly(quadrangle - 2 * q, 'proved', `${method} (Arslan 2009)`, {
        authors: 'O. Arslan',
        year: 2009,
        title: 'The dimension of LU(3,q) codes',
        where: 'J. Combin. Theory Ser. A 116, 1074–1079',
      });
}

function buildGraph(q: number): BlockDesign {
  const field = galoisField(q);
  const { add, sub, mul } = field;
  const blocks = new BlockList(q ** 3, q ** 3, q);
  const block = new Uint32Array(q);
  for (let x = 0; x < q; x++) {
    for (let y = 0; y < q; y++) {
      for (let z = 0; z < q; z++) {
        for (let a = 0; a < q; a++) block[a] = (a * q + sub(y, mul(a, x))) * q + sub(z, mul(a, y));
        blocks.add(block);
      }
    }
  }
  const move = (image: (a: number, b: number, c: number) => readonly [number, number, number]) =>
    Uint32Array.from({ length: q ** 3 }, (_, point) => {
      const [a, b, c] = image(Math.floor(point / (q * q)), Math.floor(point / q) % q, point % q);
      return (a * q + b) * q + c;
    });
  // Blocks go to [x, y + x, z + 2y + x], [x, y + 1, z] and [x, y, z + 1].
  const symmetry = [
    { order: field.p, pointPerm: move((a, b, c) => [add(a, 1), b, add(c, b)]) },
    { order: field.p, pointPerm: move((a, b, c) => [a, add(b, 1), sub(c, a)]) },
    { order: field.p, pointPerm: move((a, b, c) => [a, b, add(c, 1)]) },
  ];
  const classes = Uint32Array.from({ length: q ** 3 }, (_, i) => Math.floor(i / (q * q)));
  return blocks.finish({ classes, symmetry });
}
