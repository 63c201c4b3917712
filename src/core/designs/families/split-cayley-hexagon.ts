import { z } from 'zod';
import { primePowerOf } from '../../algebra/integers.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { grassmann, hexagonSymmetry, parabolicForm } from '../geometry/polar-forms.ts';
import { forEachPolarLine, polarPoints } from '../geometry/polar-lines.ts';
import { rankFromSpectrum } from '../geometry/spectral-rank.ts';
import { between, predictPartialLinearCodes } from '../partial-linear-prediction.ts';

const MAX_HEXAGON_ORDER = 4;

/** The split Cayley hexagon H(q): the points of Q(6,q) and those of its lines whose Grassmann coordinates satisfy Tits's
 *  six equations. A generalised hexagon: its incidence graph has girth 12.
 *  Source: Tits 1959; the equations as in Van Maldeghem 1998, 2.4.13. */
export const splitCayleyHexagon = defineFamily({
  id: 'split-cayley-hexagon',
  title: 'Split Cayley hexagon H(q)',
  params: [
    {
      name: 'q',
      label: 'order q',
      kind: 'integer',
      accepted: `a prime power from 2 to ${MAX_HEXAGON_ORDER}`,
      example: 2,
    },
  ],
  source: {
    authors: 'J. Tits',
    year: 1959,
    title: 'Sur la trialité et certains groupes qui s’en déduisent',
    where: 'Inst. Hautes Études Sci. Publ. Math. 2, 13–60',
  },
  schema: z.strictObject({ q: z.number().int().min(2).max(100_000) }),
  require: ({ q }) => {
    if (!primePowerOf(q)) throw new ParamError('q', q, `a prime power from 2 to ${MAX_HEXAGON_ORDER}`);
    if (q > MAX_HEXAGON_ORDER) throw new LimitError(`H(${q})`, pointCount(q), pointCount(MAX_HEXAGON_ORDER), 'points');
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (let q = 2; q <= MAX_HEXAGON_ORDER; q++) if (pointCount(q) <= Math.min(maxPoints, maxBlocks)) yield { q };
  },
  predict: ({ q }) => predictHexagon(q),
  build: ({ q }) => buildHexagon(q),
});

function pointCount(q: number): number {
  return (q ** 6 - 1) / (q - 1);
}

/** N·Nᵀ has the eigenvalues (q+1)², 3q and q (Brouwer, Cohen, Neumaier 1989, 6.5), which enclose the rank. The lines
 *  within two steps of one line are independent: with no cycle shorter than 12 the farthest have q points each that no
 *  other of them holds. */
function predictHexagon(q: number): DesignPrediction {
  const v = pointCount(q);
  const counts = { v, b: v, k: q + 1, r: q + 1 };
  const half = (q * (q + 1) ** 2) / 2;
  const spectral = rankFromSpectrum([
    { value: (q + 1) ** 2, multiplicity: 1 },
    { value: 3 * q, multiplicity: (half * (q * q + q + 1)) / 3 },
    { value: q, multiplicity: half * (q * q - q + 1) },
  ]);
  const lower = Math.max(spectral.lower, 1 + (q + 1) * (q + q ** 3));
  const rank = between(lower, spectral.upper, 'invariant factors, or lines near one line, below; rational rank above');
  return {
    t: 1,
    ...counts,
    lambda: q + 1,
    partialLinear: true,
    codes: predictPartialLinearCodes(counts, { girth: 12, rank }),
  };
}

/** Equal Grassmann coordinates: p12 = p34, p54 = p32, p20 = p35, p65 = p30, p01 = p36, p46 = p31. */
const TITS_EQUATIONS = [
  [1, 2, 3, 4],
  [5, 4, 3, 2],
  [2, 0, 3, 5],
  [6, 5, 3, 0],
  [0, 1, 3, 6],
  [4, 6, 3, 1],
] as const;

function buildHexagon(q: number): BlockDesign {
  const form = parabolicForm(q);
  const points = polarPoints(form);
  const blocks = new BlockList(pointCount(q), pointCount(q), q + 1);
  forEachPolarLine(
    form,
    points,
    (line) => blocks.add(line),
    (x, y) =>
      TITS_EQUATIONS.every(([a, b, c, d]) => grassmann(form.field, x, y, a, b) === grassmann(form.field, x, y, c, d)),
  );
  return blocks.finish({ symmetry: hexagonSymmetry(form, points).filter(({ order }) => order > 1) });
}
