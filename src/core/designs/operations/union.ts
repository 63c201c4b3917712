import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { blockOf, designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { defineFamily } from '../family.ts';
import { codesOfTwoDesign, innerSpecParam, innerSpecSchema, lambdaAt, specsOf } from './inner-spec.ts';

/** The blocks of two designs on the same points, with blocks of one size: a design of the lesser strength, λ added.
 *  A block of both is then there twice. */
export const union = defineFamily({
  id: 'union',
  title: 'Union of two designs',
  params: [
    innerSpecParam('first', { family: 'steiner-triple', params: { v: 15, method: 'bose' } }),
    innerSpecParam('second', { family: 'kirkman-triple', params: { v: 15 } }),
  ],
  source: {
    authors: 'D. R. Hughes, F. C. Piper',
    year: 1985,
    title: 'Design Theory',
    where: 'Cambridge University Press',
    part: 'Chapter 1',
  },
  schema: z.strictObject({ first: innerSpecSchema, second: innerSpecSchema }),
  require({ first, second }) {
    const [one, other] = [predictDesign(first), predictDesign(second)];
    if (one.v === other.v && one.k === other.k) return;
    const given = `${other.v} points, blocks of ${other.k}`;
    throw new ParamError('second', given, `a design on ${one.v} points with blocks of ${one.k}, as in first`);
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const first of specsOf('kirkman-triple', { maxPoints, maxBlocks: maxBlocks / 2 })) {
      yield { first, second: { family: 'relabel', params: { of: first, seed: '1' } } };
    }
  },
  predict({ first, second }) {
    const [one, other] = [predictDesign(first), predictDesign(second)];
    const t = Math.min(one.t, other.t);
    const at = (s: number) => lambdaAt(one, s) + lambdaAt(other, s);
    const counts = { v: one.v, b: one.b + other.b, k: one.k, r: one.r + other.r };
    return { t, ...counts, lambda: at(t), codes: t >= 2 ? codesOfTwoDesign({ ...counts, lambda: at(2) }) : [] };
  },
  build({ first, second }) {
    const [one, other] = [buildDesign(first), buildDesign(second)];
    const blocks = [one, other].flatMap((design) => Array.from({ length: design.b }, (_, i) => blockOf(design, i)));
    return designFromBlocks(one.v, blocks);
  },
});
