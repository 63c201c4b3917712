import { z } from 'zod';
import { type GaloisField, galoisField } from '../../algebra/galois-field.ts';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign, Symmetry } from '../block-design.ts';
import { rankOfTwoDesign } from '../code-prediction.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { exactly } from '../partial-linear-prediction.ts';

const MAX_UNITAL_ORDER = 16;

/** The Hermitian unital, an S(2, q+1, q³+1): the points of y^q + y = x^(q+1) in PG(2,q²) with the one at infinity, and the
 *  lines that meet them in more than one. Resolvable, as Bose showed: the class of a point Q on the tangent at infinity holds
 *  the secants on Q and the polar line of Q. Source: Bose 1959; Barwick and Ebert 2008, chapter 2. */
export const hermitianUnital = defineFamily({
  id: 'hermitian-unital',
  title: 'Hermitian unital',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_UNITAL_ORDER}`,
      example: 4,
    },
  ],
  source: {
    authors: 'R. C. Bose',
    year: 1959,
    title:
      'On the application of finite projective geometry for deriving a certain series of balanced Kirkman arrangements',
    where: 'Calcutta Math. Soc. Golden Jubilee Commemoration Volume, 341–354',
  },
  schema: z.strictObject({ q: z.number().int().min(2).max(100_000) }),
  require: ({ q }) => {
    if (!primePowerOf(q)) throw new ParamError('q', q, `a prime power from 2 to ${MAX_UNITAL_ORDER}`);
    if (q > MAX_UNITAL_ORDER)
      throw new LimitError('a Hermitian unital', q ** 3 + 1, MAX_UNITAL_ORDER ** 3 + 1, 'points');
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(MAX_UNITAL_ORDER)) {
      const { v, b } = unitalCounts(q);
      if (v <= maxPoints && b <= maxBlocks) yield { q };
    }
  },
  predict: ({ q }) => predictUnital(q),
  build: ({ q }) => buildUnital(q),
});

function unitalCounts(q: number) {
  return { v: q ** 3 + 1, b: q * q * (q * q - q + 1), k: q + 1, r: q * q, lambda: 1 };
}

function predictUnital(q: number): DesignPrediction {
  const counts = unitalCounts(q);
  const codes = predictFlatCodes(counts, { rank: rankOfUnital(q), structure: { blocks: 'none', points: 'none' } });
  return { t: 2, ...counts, resolvable: true, codes };
}

/** Even q: r − λ is odd, so everything. Odd q: 2 divides q + 1, and modulo such primes the rank is q(q² − q + 1). */
function rankOfUnital(q: number): Graded<Enclosure> {
  if (q % 2 === 0) return rankOfTwoDesign(unitalCounts(q));
  return exactly(q * (q * q - q + 1), 'proved', 'q(q² − q + 1) modulo primes dividing q + 1 (Hiss 2004)', {
    authors: 'G. Hiss',
    year: 2004,
    title: 'Hermitian function fields, classical unitals, and representations of 3-dimensional unitary groups',
    where: 'Indag. Math. 15, 223–243',
  });
}

/** Point x·q + i is (x, y) with y the i-th solution of y^q + y = x^(q+1); the last point is the one at infinity. */
function buildUnital(q: number): BlockDesign {
  const field = galoisField(q * q);
  const { v, b, k } = unitalCounts(q);
  const Q = q * q;
  const relativeTrace = Uint32Array.from({ length: Q }, (_, y) => field.add(field.pow(y, q), y));
  const norm = Uint32Array.from({ length: Q }, (_, x) => field.pow(x, q + 1));
  const pointAt = new Int32Array(Q * Q).fill(-1); // by x·q² + y
  for (let x = 0, point = 0; x < Q; x++) {
    for (let y = 0; y < Q; y++) if (relativeTrace[y] === norm[x]) pointAt[x * Q + y] = point++;
  }
  const blocks = new BlockList(v, b, k);
  const classes = new Uint32Array(b); // by slope; the polar line of slope s is x = s^q, so x belongs to slope x^q
  for (let x = 0; x < Q; x++) {
    classes[x] = field.pow(x, q);
    blocks.add([...Array.from({ length: q }, (_, i) => x * q + i), v - 1]);
  }
  const onLine = new Uint32Array(k);
  for (let slope = 0; slope < Q; slope++) {
    for (let y0 = 0; y0 < Q; y0++) {
      let size = 0;
      for (let x = 0; x < Q; x++) {
        const y = field.add(field.mul(slope, x), y0);
        if (relativeTrace[y] === norm[x]) onLine[size++] = pointAt[x * Q + y]!;
      }
      if (size === 1) continue; // a tangent; every other line meets the unital in q + 1 points
      classes[blocks.size] = slope;
      blocks.add(onLine.subarray(0, size));
    }
  }
  return blocks.finish({ classes, symmetry: symmetryOf(field, q, pointAt) });
}

/** (x, y) → (gx, g^(q+1) y), and the translation (x, y) → (x + 1, y + x + c) with c^q + c = 1. */
function symmetryOf(field: GaloisField, q: number, pointAt: Int32Array): Symmetry[] {
  const Q = q * q;
  const infinity = q ** 3;
  const permutation = (image: (x: number, y: number) => [number, number]) => {
    const pointPerm = new Uint32Array(infinity + 1);
    pointPerm[infinity] = infinity;
    for (let x = 0; x < Q; x++) {
      for (let y = 0; y < Q; y++) {
        const point = pointAt[x * Q + y]!;
        if (point < 0) continue;
        const [u, w] = image(x, y);
        pointPerm[point] = pointAt[u * Q + w]!;
      }
    }
    return pointPerm;
  };
  const g = field.exp[1]!;
  let c = 0;
  while (field.add(field.pow(c, q), c) !== 1) c++;
  return [
    { order: Q - 1, pointPerm: permutation((x, y) => [field.mul(g, x), field.mul(field.pow(g, q + 1), y)]) },
    {
      order: field.p === 2 ? 4 : field.p,
      pointPerm: permutation((x, y) => [field.add(x, 1), field.add(field.add(y, x), c)]),
    },
  ];
}
