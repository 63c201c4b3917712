import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { type BlockDesign, blockOf, designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { codesOfTwoDesign, innerSpecParam, innerSpecSchema, lambdaAt, specsOf } from './inner-spec.ts';

const schema = z.strictObject({ of: innerSpecSchema, point: z.number().int().min(0).optional() });
type Params = z.infer<typeof schema>;

/** The blocks on one point (0 when left out), without it: a (t−1)-(v−1, k−1, λ) design from a t-design, t ≥ 2.
 *  Points above it move down by one. */
export const derived = defineFamily({
  id: 'derived',
  title: 'Derived design',
  params: [
    innerSpecParam('of', { family: 'witt', params: { v: 24 } }),
    {
      name: 'point',
      label: 'point',
      kind: 'integer',
      accepted: 'a point of the design, counted from 0',
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
  require: ({ of, point = 0 }) => requirePointOf(predictDesign(of), point),
  *enumerate({ maxPoints, maxBlocks }) {
    for (const family of ['witt', 'steiner-quadruple', 'inversive-plane']) {
      for (const of of specsOf(family, { maxPoints: maxPoints + 1, maxBlocks: 64 * maxBlocks })) {
        if (predictDesign(of).r <= maxBlocks) yield { of };
      }
    }
  },
  predict({ of }): DesignPrediction {
    const inner = predictDesign(of);
    const counts = { v: inner.v - 1, b: inner.r, k: inner.k - 1, r: lambdaAt(inner, 2) };
    if (inner.t < 3) return { t: 1, ...counts, lambda: counts.r, codes: [] };
    const codes = codesOfTwoDesign({ ...counts, lambda: lambdaAt(inner, 3) });
    return { t: inner.t - 1, ...counts, lambda: inner.lambda, codes };
  },
  build: ({ of, point = 0 }: Params) => withoutPoint(buildDesign(of), point, true),
});

/** @throws ParamError unless the design is a t-design with t ≥ 2 and k ≥ 3, and has the point. */
export function requirePointOf({ t, v, k }: DesignPrediction, point: number): void {
  if (t < 2 || k < 3)
    throw new ParamError('of', `a ${t}-design with blocks of ${k}`, 'a t-design with t ≥ 2 and blocks of 3 or more');
  if (point >= v) throw new ParamError('point', point, `a point from 0 to ${v - 1}`);
}

/** The blocks on the point (or those that miss it), on the other points, renumbered. */
export function withoutPoint(design: BlockDesign, point: number, through: boolean): BlockDesign {
  const blocks: number[][] = [];
  for (let i = 0; i < design.b; i++) {
    const block = blockOf(design, i);
    if (block.includes(point) !== through) continue;
    blocks.push(
      Array.from(
        block.filter((p) => p !== point),
        (p) => (p > point ? p - 1 : p),
      ),
    );
  }
  return designFromBlocks(design.v - 1, blocks);
}
