import { describe, expect, test } from 'vitest';
import { deriveLdpc } from '../../src/core/codes/ldpc.ts';
import { type BlockDesign, blockOf } from '../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../src/core/designs/design.ts';
import { hamadaRank } from '../../src/core/designs/geometry/hamada.ts';
import { breadthFirstGirth } from '../models/girth.ts';
import { eliminationRank, weightDistribution } from '../models/rank.ts';
import reference from './finite-geometry.json' with { type: 'json' };

interface GeometryValue {
  id: string;
  family: string;
  params: Record<string, number | string>;
  v?: number;
  b?: number;
  rank?: number;
  girth?: number;
  distance?: number;
  weights?: Record<string, number>;
  dualWeights?: Record<string, number>;
  intersections?: Record<string, number>;
}

const values = reference.values as unknown as GeometryValue[];

describe.each(values.map((value) => [value.id, value] as const))('%s', (_, value) => {
  const spec = { family: value.family, params: value.params };
  const prediction = predictDesign(spec);
  const code = prediction.codes.find((c) => c.checks === 'blocks')!;

  test('the closed formulas agree', () => {
    if (value.v !== undefined) expect([prediction.v, prediction.b]).toEqual([value.v, value.b]);
    if (value.girth !== undefined) expect(code.girth.value).toEqual({ lower: value.girth, upper: value.girth });
    if (value.distance !== undefined)
      expect(code.distance.value).toEqual({ lower: value.distance, upper: value.distance });
    if (value.rank === undefined) return;
    const { lower, upper } = code.rank.value;
    expect(lower <= value.rank && value.rank <= upper).toBe(true);
    if (code.rank.grade === 'proved') expect([lower, upper]).toEqual([value.rank, value.rank]);
  });

  test('the built design agrees', () => {
    const design = buildDesign(spec);
    const { H } = deriveLdpc(design, { checks: 'blocks' });
    if (value.rank !== undefined && H.rows * H.cols < 4e6) expect(eliminationRank(H)).toBe(value.rank);
    if (value.girth !== undefined && H.cols <= 128) expect(breadthFirstGirth(H)).toBe(value.girth);
    if (value.weights) expect(weightsOf(design, 'blocks')).toEqual(value.weights);
    if (value.dualWeights) expect(weightsOf(design, 'points')).toEqual(value.dualWeights);
    if (value.intersections) expect(intersections(design)).toEqual(value.intersections);
  });
});

function weightsOf(design: BlockDesign, checks: 'blocks' | 'points'): Record<string, number> {
  return Object.fromEntries(weightDistribution(deriveLdpc(design, { checks }).H));
}

/** How many other blocks meet the first one in each number of points. */
function intersections(design: BlockDesign): Record<string, number> {
  const first = new Set(blockOf(design, 0));
  const counts: Record<string, number> = {};
  for (let i = 1; i < design.b; i++) {
    const common = blockOf(design, i).filter((p) => first.has(p)).length;
    counts[common] = (counts[common] ?? 0) + 1;
  }
  return counts;
}

test.each(reference.hamada)('Hamada’s formula: $id', ({ m, flat, p, h, rank }) => {
  expect(hamadaRank(m, p ** h, flat)).toBe(rank);
});
