import { z } from 'zod';
import { primePowerOf, primePowersUpTo } from '../../algebra/integers.ts';
import { InfeasibleError, LimitError, ParamError } from '../../errors.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { cyclicShift } from '../geometry/cyclic-design.ts';
import { MAX_FLAT_POINTS } from '../geometry/flat-limits.ts';

/** A Desarguesian spread of PG(m,q): the d-flats that are the points of PG((m+1)/(d+1) − 1, q^(d+1)). They partition the
 *  points, so they serve as a parallel class among the d-flats; two meet nowhere, so as a subspace code they have
 *  distance 2(d + 1). `spreadBasis` in geometry/spread.ts gives any one flat without building the others.
 *  Source: Segre 1964. */
export const projectiveSpread = defineFamily({
  id: 'projective-spread',
  title: 'Spread of a projective geometry',
  params: [
    { name: 'm', label: 'dimension m', kind: 'integer', accepted: 'an integer from 3 to 11', example: 3 },
    { name: 'q', label: 'field order q', kind: 'integer', accepted: 'a prime power from 2 to 9', example: 2 },
    {
      name: 'flat',
      label: 'dimension of the flats',
      kind: 'integer',
      accepted: 'an integer from 1 to m − 1 with flat + 1 a divisor of m + 1',
      example: 1,
    },
  ],
  source: {
    authors: 'B. Segre',
    year: 1964,
    title: 'Teoria di Galois, fibrazioni proiettive e geometrie non desarguesiane',
    where: 'Ann. Mat. Pura Appl. 64, 1–76',
  },
  schema: z.strictObject({
    m: z.number().int().min(3).max(11),
    q: z.number().int().min(2).max(9),
    flat: z.number().int().min(1),
  }),
  require: requireSpread,
  *enumerate({ maxPoints, maxBlocks }) {
    for (const q of primePowersUpTo(9)) {
      for (let m = 3; m <= 11; m++) {
        for (let flat = 1; flat < m; flat++) {
          if ((m + 1) % (flat + 1) !== 0) continue;
          const { v, b } = spreadCounts({ m, q, flat });
          if (v <= Math.min(maxPoints, MAX_FLAT_POINTS) && b <= maxBlocks) yield { m, q, flat };
        }
      }
    }
  },
  predict: predictSpread,
  build: buildSpread,
});

interface SpreadParams {
  m: number;
  q: number;
  flat: number;
}

function requireSpread(params: SpreadParams): void {
  const { m, q, flat } = params;
  if (!primePowerOf(q)) throw new ParamError('q', q, 'a prime power from 2 to 9');
  if (flat >= m) throw new ParamError('flat', flat, `a dimension from 1 to ${m - 1}`);
  if ((m + 1) % (flat + 1) !== 0) {
    throw new InfeasibleError(
      'spread-divisibility',
      `PG(${m},${q}) has no spread of ${flat}-flats: ${flat} + 1 would have to divide ${m} + 1 for their points to add up.`,
      projectiveSpread.source,
      'flat',
    );
  }
  const { v } = spreadCounts(params);
  if (v > MAX_FLAT_POINTS) throw new LimitError('a geometry', v, MAX_FLAT_POINTS, 'points');
}

function spreadCounts({ m, q, flat }: SpreadParams) {
  const k = (q ** (flat + 1) - 1) / (q - 1);
  const v = (q ** (m + 1) - 1) / (q - 1);
  return { v, b: Math.round(v / k), k, r: 1 };
}

/** No codes: checks that share no bit make a code of distance 2 and nothing more. */
function predictSpread(params: SpreadParams): DesignPrediction {
  return { t: 1, ...spreadCounts(params), lambda: 1, partialLinear: true, resolvable: true, cyclic: true, codes: [] };
}

/** In Singer order the flat of x^0 is the subfield GF(q^(flat+1)), every b-th point; the others are its translates. */
function buildSpread(params: SpreadParams): BlockDesign {
  const { v, b, k } = spreadCounts(params);
  if (b * k !== v) throw new Error(`${v} points are not ${b} flats of ${k}`);
  const blockPoints = Uint32Array.from({ length: v }, (_, i) => Math.floor(i / k) + (i % k) * b);
  return {
    v,
    b,
    blockStart: Uint32Array.from({ length: b + 1 }, (_, i) => i * k),
    blockPoints,
    classes: new Uint32Array(b),
    symmetry: [{ order: v, pointPerm: cyclicShift(v) }],
  };
}
