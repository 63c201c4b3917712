import { z } from 'zod';
import { seededRandom } from '../../algebra/seeded-random.ts';
import { schonheimBound } from '../../bounds/schonheim-bound.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { BlockDesign, DesignSpec } from '../block-design.ts';
import { designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { greedyCovering } from '../packing-covering/coverings.ts';
import { quadruplesAreBuilt } from '../quadruple-systems/quadruples.ts';
import { binomial } from '../subset-rank.ts';
import { coverageParams } from './packing.ts';

const METHODS = ['optimal', 'greedy', 'random-greedy'] as const;
const MAX_COUNTERS = 300_000;
/** Blocks grown for each one taken by the random greedy method. */
const CANDIDATES = 12;

const schema = z.strictObject({
  t: z.number().int().min(2).max(5),
  k: z.number().int().min(3).max(32),
  v: z.number().int().min(4).max(3000),
  method: z.enum(METHODS),
  seed: z.string().min(1).max(64).optional(),
});
type Params = z.infer<typeof schema>;

/** Coverings: every t points in some block of k. `optimal` meets Schönheim's bound where a Steiner triple or quadruple
 *  system does. The other methods search with a seed; their gap is shown through reportCovering, and for them the
 *  predicted b is Schönheim's bound, which no covering can go below. */
export const covering = defineFamily({
  id: 'covering',
  title: 'Covering',
  params: coverageParams(METHODS, 13),
  source: { authors: 'J. Schönheim', year: 1964, title: 'On coverings', where: 'Pacific J. Math. 14, 1405–1411' },
  schema,
  require: requireCovering,
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let v = 7; v <= Math.min(maxPoints, 1000); v++) {
      for (const [t, k] of [
        [2, 3],
        [3, 4],
      ] as const) {
        if (steinerSpec(t, k, v) && schonheimBound(v, k, t) <= maxBlocks) yield { t, k, v, method: 'optimal' };
      }
    }
  },
  predict({ t, k, v, method }): DesignPrediction {
    const steiner = method === 'optimal' ? steinerSpec(t, k, v) : undefined;
    if (steiner) return { ...predictDesign(steiner) };
    const b = schonheimBound(v, k, t);
    const r = Math.ceil((b * k) / v);
    return { t: 1, v, b, k, r, lambda: r, codes: [] };
  },
  build: buildCovering,
});

function requireCovering({ t, k, v, method }: Params): void {
  if (t >= k) throw new ParamError('t', t, `an integer from 2 to ${k - 1}, less than k`);
  if (k >= v) throw new ParamError('k', k, `an integer from 3 to ${v - 1}, less than v`);
  if (method === 'optimal' && !steinerSpec(t, k, v)) {
    throw new ParamError('method', method, 'optimal only where a Steiner triple or quadruple system is built');
  }
  const counters = binomial(v, t);
  if (method !== 'optimal' && counters > MAX_COUNTERS) {
    throw new LimitError('search of a covering', counters, MAX_COUNTERS, 't-subsets');
  }
}

function steinerSpec(t: number, k: number, v: number): DesignSpec | undefined {
  if (t === 2 && k === 3 && (v % 6 === 1 || v % 6 === 3)) {
    return { family: 'steiner-triple', params: { v, method: v % 6 === 3 ? 'bose' : 'skolem' } };
  }
  const quadruples = t === 3 && k === 4 && v >= 8 && v <= 128 && v % 6 !== 0 && v % 2 === 0 && quadruplesAreBuilt(v);
  return quadruples ? { family: 'steiner-quadruple', params: { v } } : undefined;
}

function buildCovering({ t, k, v, method, seed = '1' }: Params): BlockDesign {
  const steiner = method === 'optimal' ? steinerSpec(t, k, v) : undefined;
  if (steiner) return buildDesign(steiner);
  const blocks = greedyCovering(t, k, v, seededRandom(seed), method === 'greedy' ? 1 : CANDIDATES);
  if (blocks.length < schonheimBound(v, k, t)) throw new Error('a covering went below Schönheim’s bound');
  return designFromBlocks(v, blocks);
}
