import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { blockOf, designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { between, predictPartialLinearCodes } from '../partial-linear-prediction.ts';
import { innerSpecParam, innerSpecSchema, lambdaAt, specsOf } from './inner-spec.ts';

const schema = z.strictObject({ of: innerSpecSchema, keep: z.number().int().min(2) });
type Params = z.infer<typeof schema>;

/** The first `keep` parallel classes of a design with a resolution: every point on `keep` blocks. Two points still lie
 *  on at most one block when they did before. */
export const classesKept = defineFamily({
  id: 'classes',
  title: 'Parallel classes of a design',
  params: [
    innerSpecParam('of', { family: 'kirkman-triple', params: { v: 15 } }),
    {
      name: 'keep',
      label: 'classes kept',
      kind: 'integer',
      accepted: 'an integer from 2 to the number of classes',
      example: 4,
    },
  ],
  source: {
    authors: 'S. J. Johnson, S. R. Weller',
    year: 2003,
    title: 'Resolvable 2-designs for regular low-density parity-check codes',
    where: 'IEEE Trans. Commun. 51, 1413–1419',
  },
  schema,
  require({ of, keep }) {
    const inner = predictDesign(of);
    if (!inner.resolvable)
      throw new ParamError('of', of.family, 'a design whose construction gives its parallel classes');
    if (keep > inner.r) throw new ParamError('keep', keep, `an integer from 2 to ${inner.r}, the number of classes`);
  },
  *enumerate(within): Generator<Params> {
    for (const family of ['kirkman-triple', 'affine-plane']) {
      for (const of of specsOf(family, { ...within, maxBlocks: 8 * within.maxBlocks })) {
        const { resolvable, r, v, k } = predictDesign(of);
        for (let keep = 3; resolvable && keep < r && (keep * v) / k <= within.maxBlocks; keep++) yield { of, keep };
      }
    }
  },
  predict: predictClasses,
  build({ of, keep }) {
    const design = buildDesign(of);
    const kept = Array.from({ length: design.b }, (_, i) => i).filter((i) => design.classes![i]! < keep);
    return designFromBlocks(
      design.v,
      kept.map((i) => blockOf(design, i)),
      { classes: Uint32Array.from(kept, (i) => design.classes![i]!) },
    );
  },
});

function predictClasses({ of, keep }: Params): DesignPrediction {
  const inner = predictDesign(of);
  const counts = { v: inner.v, b: (keep * inner.v) / inner.k, k: inner.k, r: keep };
  const linear = inner.partialLinear || (inner.t >= 2 && lambdaAt(inner, 2) === 1);
  const base = { t: 1, ...counts, lambda: keep, resolvable: true };
  if (!linear) return { ...base, codes: [] };
  // Every vertex has degree 2 at least, so there is a cycle, but nothing keeps a triangle among the classes.
  const girth = between(6, 2 * Math.min(counts.v, counts.b), 'no two points on two blocks; some cycle');
  const codes = predictPartialLinearCodes(counts, { girth: 6 }).map((code) => ({ ...code, girth }));
  return { ...base, partialLinear: true, codes };
}
