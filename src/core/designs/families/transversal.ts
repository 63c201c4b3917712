import { z } from 'zod';
import { galoisField } from '../../algebra/galois-field.ts';
import { factor } from '../../algebra/integers.ts';
import { InfeasibleError, LimitError } from '../../errors.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { between, exactly, predictPartialLinearCodes } from '../partial-linear-prediction.ts';

const MAX_GROUP_SIZE = 256;

const schema = z.strictObject({
  k: z
    .number()
    .int()
    .min(3)
    .max(MAX_GROUP_SIZE + 1),
  g: z.number().int().min(2).max(MAX_GROUP_SIZE),
});
type Params = z.infer<typeof schema>;

const MACNEISH = {
  authors: 'H. F. MacNeish',
  year: 1922,
  title: 'Euler squares',
  where: 'Ann. of Math. 23, 221–227',
};

/** Transversal designs TD(k,g): k groups of g points, g² blocks, one point of each group on a block, two points of
 *  different groups on exactly one. Block (x, y) meets group j in a_j·x + y, the a_j having invertible differences in
 *  the product of fields of order g; a last group may hold x itself. In the order x·g + y the incidence matrix is an
 *  array of g × g circulants when g is squarefree (Fan 2000). Blocks of one x form a parallel class. */
export const transversal = defineFamily({
  id: 'transversal',
  title: 'Transversal design TD(k,g)',
  params: [
    {
      name: 'k',
      label: 'groups k',
      kind: 'integer',
      accepted: 'an integer from 3 to one more than the least prime power dividing g',
      example: 4,
    },
    {
      name: 'g',
      label: 'group size g',
      kind: 'integer',
      accepted: `an integer from 2 to ${MAX_GROUP_SIZE}`,
      example: 17,
    },
  ],
  source: MACNEISH,
  schema,
  require: requireSquares,
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let g = 2; g <= MAX_GROUP_SIZE && g * g <= maxBlocks; g++) {
      const most = Math.min(reach(g), Math.floor(maxPoints / g));
      for (let k = 3; k <= most; k++) yield { k, g };
    }
  },
  predict: predictTransversal,
  build: buildTransversal,
});

/** Groups that the product of fields gives: its least factor plus one. */
function reach(g: number): number {
  return Math.min(...factor(g).map(({ p, m }) => p ** m)) + 1;
}

function requireSquares({ k, g }: Params): void {
  if (k > g + 1) {
    const statement = `TD(k,${g}) has at most ${g + 1} groups, as there are at most ${g - 1} orthogonal squares of order ${g}; k = ${k} was asked for.`;
    throw new InfeasibleError('orthogonal-squares', statement, { ...MACNEISH, part: 'N(g) ≤ g − 1' }, 'k');
  }
  if (g === 6 && k > 3) {
    const source = {
      authors: 'G. Tarry',
      year: 1901,
      title: 'Le problème de 36 officiers',
      where: 'C. R. Assoc. Franç. 2, 170–203',
    };
    throw new InfeasibleError(
      'tarry',
      `There are no two orthogonal squares of order 6, so TD(k,6) has k = 3 at most.`,
      source,
      'k',
    );
  }
  if (k > reach(g)) throw new LimitError(`groups of TD(k,${g}) from MacNeish products`, k, reach(g), 'groups');
}

const isSquarefree = (g: number) => factor(g).every(({ m }) => m === 1);

function predictTransversal({ k, g }: Params): DesignPrediction {
  const counts = { v: k * g, b: g * g, k, r: g };
  const resolvable = k < reach(g);
  const circulant = resolvable && isSquarefree(g) ? 'quasi-cyclic' : 'none';
  // g odd: N·Nᵀ is the identity on vectors of even weight in every group, and the sum of a group's rows, the all-one
  // word, is outside their image; the sums of all groups agree. g even: two groups' rows have rank 2g − 1.
  const top = k * g - k + 1;
  const rank =
    g % 2 === 1
      ? exactly(top, 'proved', 'g odd: every group repeats one relation')
      : between(2 * g - 1, Math.min(top, g * g), 'rows of two groups below; one relation a group above');
  return {
    t: 1,
    ...counts,
    lambda: g,
    partialLinear: true,
    ...(resolvable ? { resolvable } : {}),
    codes: predictPartialLinearCodes(counts, { girth: 6, rank, structure: { blocks: circulant, points: circulant } }),
  };
}

function buildTransversal({ k, g }: Params): BlockDesign {
  const { times, plus, one } = productOfFields(g);
  const finite = Math.min(k, reach(g) - 1);
  const blockPoints = new Uint32Array(k * g * g);
  const classes = new Uint32Array(g * g);
  let e = 0;
  for (let x = 0; x < g; x++) {
    const products = Array.from({ length: finite }, (_, j) => times(j, x));
    for (let y = 0; y < g; y++) {
      for (let j = 0; j < finite; j++) blockPoints[e++] = j * g + plus(products[j]!, y);
      if (finite < k) blockPoints[e++] = finite * g + x;
      classes[x * g + y] = x;
    }
  }
  const shift = Uint32Array.from({ length: k * g }, (_, p) => (p < finite * g ? p - (p % g) + plus(p % g, one) : p));
  const order = factor(g).reduce((product, { p }) => product * p, 1);
  return {
    v: k * g,
    b: g * g,
    blockStart: Uint32Array.from({ length: g * g + 1 }, (_, i) => i * k),
    blockPoints,
    ...(finite === k ? { classes } : {}),
    symmetry: [{ order, pointPerm: shift }],
  };
}

/** Arithmetic of the product of the fields whose orders are the prime powers of g. An element is a number below g
 *  whose residues modulo those powers are its parts, so for squarefree g it is plain arithmetic modulo g.
 *  times(j, x): the j-th of a set of elements with invertible differences (its parts all numbered j), times x. */
function productOfFields(g: number) {
  const orders = factor(g).map(({ p, m }) => p ** m);
  const fields = orders.map((q) => galoisField(q));
  const join = (parts: number[]) => {
    // Chinese remainders by the orthogonal idempotents.
    return parts.reduce((sum, part, i) => (sum + part * idempotents[i]!) % g, 0);
  };
  const idempotents = orders.map((q) => {
    let x = g / q;
    while (x % q !== 1 % q) x += g / q;
    return x % g;
  });
  const sums = new Uint16Array(g * g);
  for (let a = 0; a < g; a++) {
    for (let b = 0; b < g; b++) sums[a * g + b] = join(fields.map((f, i) => f.add(a % orders[i]!, b % orders[i]!)));
  }
  return {
    one: join(orders.map(() => 1)),
    plus: (a: number, b: number) => sums[a * g + b]!,
    times: (j: number, x: number) => join(fields.map((f, i) => f.mul(j, x % orders[i]!))),
  };
}
