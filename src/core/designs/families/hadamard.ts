import { z } from 'zod';
import { InfeasibleError, LimitError } from '../../errors.ts';
import { type BlockDesign, designFromBlocks } from '../block-design.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { hadamardIsBuilt, hadamardMatrix } from '../hadamard-matrix.ts';

const MAX_ORDER = 1024;

const schema = z.strictObject({
  order: z.number().int().min(8).max(MAX_ORDER),
  t: z.union([z.literal(2), z.literal(3)]).optional(),
});
type Params = z.infer<typeof schema>;

const HADAMARD = {
  authors: 'J. Hadamard',
  year: 1893,
  title: 'Résolution d’une question relative aux déterminants',
  where: 'Bull. Sci. Math. 17, 240–246',
};

/** Designs of a normalised Hadamard matrix of order n: the symmetric 2-(n−1, n/2−1, n/4−1) design of its core, or the
 *  3-(n, n/2, n/4−1) design of its rows and their negatives, in complementary pairs (its parallel classes). */
export const hadamard = defineFamily({
  id: 'hadamard',
  title: 'Hadamard design',
  params: [
    {
      name: 'order',
      label: 'order n of the matrix',
      kind: 'integer',
      accepted: `a multiple of 4 from 8 to ${MAX_ORDER} that Sylvester’s and Paley’s constructions reach`,
      example: 12,
    },
    {
      name: 't',
      label: 'strength t',
      kind: 'integer',
      accepted: '2 or 3 (2 when left out)',
      example: 2,
      optional: true,
    },
  ],
  source: HADAMARD,
  schema,
  require({ order }) {
    if (order % 4 !== 0) {
      const statement = `A Hadamard matrix of order above 2 has an order divisible by 4; ${order} is not, ${order - (order % 4)} and ${order - (order % 4) + 4} are.`;
      throw new InfeasibleError('hadamard-order', statement, HADAMARD, 'order');
    }
    if (!hadamardIsBuilt(order)) {
      throw new LimitError(
        `Hadamard matrix of order ${order}, outside Sylvester’s and Paley’s constructions; nearest below`,
        order,
        nearestBelow(order),
        'rows',
      );
    }
  },
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let order = 8; order <= Math.min(MAX_ORDER, maxPoints + 1, maxBlocks + 1); order += 4) {
      if (!hadamardIsBuilt(order)) continue;
      yield { order };
      if (order <= maxPoints && 2 * (order - 1) <= maxBlocks) yield { order, t: 3 };
    }
  },
  predict: predictHadamard,
  build: buildHadamard,
});

function nearestBelow(order: number): number {
  let n = order;
  while (!hadamardIsBuilt(n)) n -= 4;
  return n;
}

function predictHadamard({ order: n, t = 2 }: Params): DesignPrediction {
  const lambda = n / 4 - 1;
  if (t === 2) {
    const counts = { v: n - 1, b: n - 1, k: n / 2 - 1, r: n / 2 - 1, lambda };
    return { t: 2, ...counts, codes: predictTwoDesignCodes(counts) };
  }
  const counts = { v: n, b: 2 * (n - 1), k: n / 2, r: n - 1, lambda: n / 2 - 1 };
  return { t: 3, ...counts, lambda, resolvable: true, codes: predictTwoDesignCodes(counts) };
}

function buildHadamard({ order: n, t = 2 }: Params): BlockDesign {
  const matrix = hadamardMatrix(n)!;
  const columns = (i: number, sign: number) => {
    const found: number[] = [];
    for (let j = t === 2 ? 1 : 0; j < n; j++) if (matrix[i * n + j] === sign) found.push(t === 2 ? j - 1 : j);
    return found;
  };
  const rows = Array.from({ length: n - 1 }, (_, i) => i + 1);
  if (t === 2)
    return designFromBlocks(
      n - 1,
      rows.map((i) => columns(i, 1)),
    );
  const classes = Uint32Array.from({ length: 2 * (n - 1) }, (_, i) => i >> 1);
  return designFromBlocks(
    n,
    rows.flatMap((i) => [columns(i, 1), columns(i, -1)]),
    { classes },
  );
}
