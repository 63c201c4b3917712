import { z } from 'zod';
import { seededRandom } from '../../algebra/seeded-random.ts';
import { LimitError, ParamError } from '../../errors.ts';
import { designFromBlocks } from '../block-design.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { type DesignPrediction, defineFamily, type ParamInfo } from '../family.ts';
import { packingBound } from '../packing-covering/coverage.ts';
import {
  climbPairs,
  greedyPacking,
  optimalQuadruples,
  optimalTriples,
  quadruplesGive,
  randomGreedyPacking,
} from '../packing-covering/packings.ts';
import { predictPartialLinearCodes } from '../partial-linear-prediction.ts';
import { binomial } from '../subset-rank.ts';

const METHODS = ['optimal', 'greedy', 'random-greedy', 'climbing'] as const;

/** Largest searches: t-subsets with a counter, and k-subsets gone through by the greedy method. */
const MAX_COUNTERS = 5_000_000;
const MAX_GREEDY_SUBSETS = 30_000_000;
const MAX_OPTIMAL_TRIPLES_POINTS = 1000;
/** Tries in a row without success before the random greedy method stops, and steps of climbing a pair of points. */
const PATIENCE = 2000;
const STEPS_A_PAIR = 200;

const schema = z.strictObject({
  t: z.number().int().min(2).max(5),
  k: z.number().int().min(3).max(32),
  v: z.number().int().min(4).max(3000),
  method: z.enum(METHODS),
  seed: z.string().min(1).max(64).optional(),
});
type Params = z.infer<typeof schema>;

/** The parameters packings and coverings share. */
export const coverageParams = (methods: readonly string[], example: number): ParamInfo[] => [
  { name: 't', label: 'strength t', kind: 'integer', accepted: 'an integer from 2 to 5, less than k', example: 2 },
  { name: 'k', label: 'block size k', kind: 'integer', accepted: 'an integer from 3 to 32, less than v', example: 3 },
  { name: 'v', label: 'points v', kind: 'integer', accepted: 'an integer from 4 to 3000', example },
  {
    name: 'method',
    label: 'method',
    kind: 'choice',
    choices: methods,
    accepted: `one of ${methods.join(', ')}`,
    example: methods[0]!,
  },
  {
    name: 'seed',
    label: 'seed',
    kind: 'text',
    accepted: 'a text of 1 to 64 characters ("1" when left out)',
    example: '1',
    optional: true,
  },
];

/** Packings: blocks of k points no two of which share t. `optimal` meets the largest possible number: triples for
 *  every v (t = 2, k = 3), quadruples where a quadruple system gives them (t = 3, k = 4). The other methods search with
 *  a seed and show their gap to Johnson's bound through reportPacking; for them the predicted b is that bound. */
export const packing = defineFamily({
  id: 'packing',
  title: 'Packing',
  params: coverageParams(METHODS, 14),
  source: {
    authors: 'V. Rödl',
    year: 1985,
    title: 'On a packing and covering problem',
    where: 'European J. Comb. 6, 69–78',
  },
  schema,
  require: requirePacking,
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let v = 8; v <= Math.min(maxPoints, MAX_OPTIMAL_TRIPLES_POINTS); v += 2) {
      const regular = v % 6 !== 4;
      if (regular && packingBound(2, 3, v) <= maxBlocks) yield { t: 2, k: 3, v, method: 'optimal' };
    }
    for (let v = 7; v <= maxPoints && v < 128; v += 2) {
      if (quadruplesGive(v) && packingBound(3, 4, v) <= maxBlocks) yield { t: 3, k: 4, v, method: 'optimal' };
    }
  },
  predict: predictPacking,
  build(params) {
    const blocks = packingBlocks(params);
    if (blocks.length > packingBound(params.t, params.k, params.v)) throw new Error('a packing passed Johnson’s bound');
    return designFromBlocks(params.v, blocks);
  },
});

function requirePacking({ t, k, v, method }: Params): void {
  if (t >= k) throw new ParamError('t', t, `an integer from 2 to ${k - 1}, less than k`);
  if (k >= v) throw new ParamError('k', k, `an integer from 3 to ${v - 1}, less than v`);
  if (method === 'optimal') {
    const triples = t === 2 && k === 3 && v <= MAX_OPTIMAL_TRIPLES_POINTS;
    if (triples || (t === 3 && k === 4 && quadruplesGive(v))) return;
    const reach = `optimal only for t = 2, k = 3 up to ${MAX_OPTIMAL_TRIPLES_POINTS} points, and t = 3, k = 4 where a quadruple system on v or v + 1 points is built`;
    throw new ParamError('method', method, reach);
  }
  if (method === 'climbing' && t !== 2) throw new ParamError('method', method, 'climbing for t = 2 only');
  const counters = binomial(v, t);
  if (counters > MAX_COUNTERS) throw new LimitError('search of a packing', counters, MAX_COUNTERS, 't-subsets');
  if (method === 'greedy' && binomial(v, k) > MAX_GREEDY_SUBSETS) {
    throw new LimitError('greedy packing', binomial(v, k), MAX_GREEDY_SUBSETS, 'subsets of k points');
  }
}

function packingBlocks({ t, k, v, method, seed = '1' }: Params): number[][] {
  const random = seededRandom(seed);
  switch (method) {
    case 'optimal': {
      const blocks = t === 2 ? optimalTriples(v, random) : optimalQuadruples(v);
      if (!blocks) throw new LimitError('climbing to an optimal packing', 51, 50, 'starts');
      return blocks;
    }
    case 'greedy':
      return greedyPacking(t, k, v, random);
    case 'random-greedy':
      return randomGreedyPacking(t, k, v, random, PATIENCE);
    case 'climbing':
      return climbPairs(k, v, random, STEPS_A_PAIR * binomial(v, 2));
  }
}

function predictPacking({ t, k, v, method }: Params): DesignPrediction {
  const b = packingBound(t, k, v);
  const r = Math.floor((b * k) / v);
  const regular = method === 'optimal' && b * k === r * v && (t === 3 || v % 6 !== 4);
  if (!regular) return { t: 1, v, b, k, r, lambda: r, codes: [] };
  if (t === 3) {
    const lambda = (r * (k - 1)) / (v - 1);
    return { t: 2, v, b, k, r, lambda, codes: predictTwoDesignCodes({ v, b, k, r, lambda }) };
  }
  // A one-factor is left out when v is even; every three points off one block and one factor edge close a 6-cycle.
  const counts = { v, b, k, r };
  const codes = predictPartialLinearCodes(counts, { girth: 6 });
  return { t: 1, ...counts, lambda: r, partialLinear: true, codes };
}
