import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { type BlockDesign, blockOf, designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { requirePointOf, withoutPoint } from './derived.ts';
import { codesOfTwoDesign, innerSpecParam, innerSpecSchema, lambdaAt, specsOf } from './inner-spec.ts';

const schema = z.strictObject({
  of: innerSpecSchema,
  by: z.enum(['point', 'block']).optional(),
  at: z.number().int().min(0).optional(),
});
type Params = z.infer<typeof schema>;

/** By a point of a t-design: the blocks that miss it, a (t−1)-(v−1, k, λ_{t−1} − λ) design. By a block of a symmetric
 *  2-design: the other blocks without the points of that one, a 2-(v−k, k−λ, λ) design. */
export const residual = defineFamily({
  id: 'residual',
  title: 'Residual design',
  params: [
    innerSpecParam('of', { family: 'quadratic-residue', params: { q: 11 } }),
    {
      name: 'by',
      label: 'taken by',
      kind: 'choice',
      choices: ['point', 'block'],
      accepted: '"point" or "block" (point when left out)',
      example: 'block',
      optional: true,
    },
    {
      name: 'at',
      label: 'number of the point or block',
      kind: 'integer',
      accepted: 'a point or block of the design, counted from 0',
      example: 0,
      optional: true,
    },
  ],
  source: {
    authors: 'D. R. Hughes, F. C. Piper',
    year: 1985,
    title: 'Design Theory',
    where: 'Cambridge University Press',
    part: 'Chapter 1',
  },
  schema,
  require({ of, by = 'point', at = 0 }) {
    const inner = predictDesign(of);
    if (by === 'point') {
      if (at >= inner.v) throw new ParamError('at', at, `a point from 0 to ${inner.v - 1}`);
      requirePointOf(inner, at);
      if (inner.k >= inner.v - 1)
        throw new ParamError('of', `blocks of ${inner.k} on ${inner.v} points`, 'blocks that miss two points at least');
      return;
    }
    if (inner.b !== inner.v || inner.t !== 2 || inner.k - inner.lambda < 2) {
      throw new ParamError(
        'of',
        `a ${inner.t}-design with ${inner.b} blocks on ${inner.v} points`,
        'a symmetric 2-design for a residual by a block',
      );
    }
    if (at >= inner.b) throw new ParamError('at', at, `a block from 0 to ${inner.b - 1}`);
  },
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    const window = { maxPoints: maxPoints + 1, maxBlocks };
    for (const of of specsOf('quadratic-residue', { maxPoints, maxBlocks })) {
      if (predictDesign(of).k > 3) yield { of, by: 'block' };
    }
    for (const of of specsOf('witt', window)) yield { of };
  },
  predict: predictResidual,
  build({ of, by = 'point', at = 0 }) {
    const design = buildDesign(of);
    return by === 'point' ? withoutPoint(design, at, false) : withoutBlock(design, at);
  },
});

function predictResidual({ of, by = 'point' }: Params): DesignPrediction {
  const inner = predictDesign(of);
  if (by === 'block') {
    const { v, k, lambda } = inner;
    const counts = { v: v - k, b: v - 1, k: k - lambda, r: k, lambda };
    return { t: 2, ...counts, codes: codesOfTwoDesign(counts) };
  }
  const counts = { v: inner.v - 1, b: inner.b - inner.r, k: inner.k, r: inner.r - lambdaAt(inner, 2) };
  if (inner.t < 3) return { t: 1, ...counts, lambda: counts.r, codes: [] };
  const codes = codesOfTwoDesign({ ...counts, lambda: lambdaAt(inner, 2) - lambdaAt(inner, 3) });
  return { t: inner.t - 1, ...counts, lambda: lambdaAt(inner, inner.t - 1) - inner.lambda, codes };
}

function withoutBlock(design: BlockDesign, at: number): BlockDesign {
  const gone = new Set(blockOf(design, at));
  const kept = Array.from({ length: design.v }, (_, p) => p).filter((p) => !gone.has(p));
  const name = new Map(kept.map((p, i) => [p, i]));
  const blocks: number[][] = [];
  for (let i = 0; i < design.b; i++) {
    if (i !== at)
      blocks.push(
        Array.from(
          blockOf(design, i).filter((p) => !gone.has(p)),
          (p) => name.get(p)!,
        ),
      );
  }
  return designFromBlocks(kept.length, blocks);
}
