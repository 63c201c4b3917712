import { z } from 'zod';
import { ParamError } from '../../errors.ts';
import { type BlockDesign, blockOf } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { defineFamily } from '../family.ts';
import { binomial } from '../subset-rank.ts';
import { codesOfTwoDesign, innerSpecParam, innerSpecSchema, lambdaAt, specsOf } from './inner-spec.ts';

/** Every block replaced by the points it misses: a t-(v, v−k, λ·C(v−k,t)/C(k,t)) design. */
export const complement = defineFamily({
  id: 'complement',
  title: 'Complementary design',
  params: [innerSpecParam('of', { family: 'quadratic-residue', params: { q: 11 } })],
  source: {
    authors: 'D. R. Hughes, F. C. Piper',
    year: 1985,
    title: 'Design Theory',
    where: 'Cambridge University Press',
    part: 'Chapter 1',
  },
  schema: z.strictObject({ of: innerSpecSchema }),
  require({ of }) {
    const { v, k, t } = predictDesign(of);
    if (v - k < Math.max(t, 2))
      throw new ParamError('of', `blocks of ${k} on ${v} points`, `blocks that miss ${Math.max(t, 2)} points at least`);
  },
  *enumerate(window) {
    for (const of of specsOf('quadratic-residue', window)) yield { of };
    for (const of of specsOf('projective-plane', window)) yield { of };
    for (const of of specsOf('witt', window)) yield { of };
  },
  predict({ of }) {
    const inner = predictDesign(of);
    const { t, v, k, b, r } = inner;
    const counts = { v, b, k: v - k, r: b - r };
    const lambda = Math.round((inner.lambda * binomial(v - k, t)) / binomial(k, t));
    const codes = t >= 2 ? codesOfTwoDesign({ ...counts, lambda: b - 2 * r + lambdaAt(inner, 2) }) : [];
    return { t, ...counts, lambda, ...(inner.cyclic ? { cyclic: true } : {}), codes };
  },
  build: ({ of }) => complementOf(buildDesign(of)),
});

function complementOf(design: BlockDesign): BlockDesign {
  const { v, b } = design;
  const blockStart = new Uint32Array(b + 1);
  for (let i = 0; i < b; i++) blockStart[i + 1] = blockStart[i]! + v - blockOf(design, i).length;
  const blockPoints = new Uint32Array(blockStart[b]!);
  const stamp = new Uint32Array(v);
  let e = 0;
  for (let i = 0; i < b; i++) {
    for (const p of blockOf(design, i)) stamp[p] = i + 1;
    for (let p = 0; p < v; p++) if (stamp[p] !== i + 1) blockPoints[e++] = p;
  }
  return { v, b, blockStart, blockPoints, symmetry: design.symmetry };
}
