import { z } from 'zod';
import type { BlockDesign } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { innerSpecParam, innerSpecSchema, specsOf } from './inner-spec.ts';

/** Points and blocks exchanged: block p holds the numbers of the blocks on the point p. Of a symmetric 2-design it is
 *  a 2-design with the same parameters; otherwise only every point on k blocks is promised. */
export const dual = defineFamily({
  id: 'dual',
  title: 'Dual design',
  params: [innerSpecParam('of', { family: 'steiner-triple', params: { v: 15, method: 'bose' } })],
  source: { authors: 'P. Dembowski', year: 1968, title: 'Finite Geometries', where: 'Springer', part: 'Section 1.1' },
  schema: z.strictObject({ of: innerSpecSchema }),
  *enumerate({ maxPoints, maxBlocks }) {
    const window = { maxPoints: maxBlocks, maxBlocks: maxPoints };
    for (const family of ['quadratic-residue', 'projective-plane', 'kirkman-triple', 'affine-plane']) {
      for (const of of specsOf(family, window)) yield { of };
    }
  },
  predict: ({ of }) => predictDual(predictDesign(of)),
  build: ({ of }) => dualOf(buildDesign(of)),
});

function predictDual(inner: DesignPrediction): DesignPrediction {
  const { t, v, b, k, r, lambda } = inner;
  const symmetric = t === 2 && b === v;
  const linear = inner.partialLinear || (t === 2 && lambda === 1);
  return {
    t: symmetric ? 2 : 1,
    v: b,
    b: v,
    k: r,
    r: k,
    lambda: symmetric ? lambda : k,
    ...(linear && !symmetric ? { partialLinear: true } : {}),
    codes: inner.codes.map((code) => ({ ...code, checks: code.checks === 'points' ? 'blocks' : 'points' })),
  };
}

function dualOf({ v, b, blockStart, blockPoints }: BlockDesign): BlockDesign {
  const start = new Uint32Array(v + 1);
  for (const p of blockPoints) start[p + 1]!++;
  for (let p = 0; p < v; p++) start[p + 1]! += start[p]!;
  const next = start.slice(0, v);
  const points = new Uint32Array(blockPoints.length);
  for (let i = 0; i < b; i++)
    for (let e = blockStart[i]!; e < blockStart[i + 1]!; e++) points[next[blockPoints[e]!]!++] = i;
  return { v: b, b: v, blockStart: start, blockPoints: points };
}
