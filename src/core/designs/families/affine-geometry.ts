import { z } from 'zod';
import { gaussianBinomial, primePowerOf } from '../../algebra/integers.ts';
import { ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { type FlatParams, flatsWithin, MAX_FLAT_POINTS, requireFlats } from '../geometry/flat-limits.ts';
import { affineFlats, flatsMissingOrigin } from '../geometry/flats.ts';
import { HAMADA, hamadaRank } from '../geometry/hamada.ts';
import { rankWithIrreducibleHeart } from '../geometry/odd-rank.ts';
import { exactly, predictPartialLinearCodes } from '../partial-linear-prediction.ts';

const ORIGIN = ['with', 'without'] as const;
type Params = FlatParams & { origin: (typeof ORIGIN)[number] };

/** Points against d-flats of AG(m,q): all of them with their parallel classes, or, for cyclic codes, those that miss the
 *  origin. Source: Kou, Lin, Fossorier 2001. */
export const affineGeometry = defineFamily({
  id: 'affine-geometry',
  title: 'Flats of an affine geometry AG(m,q)',
  params: [
    { name: 'm', label: 'dimension m', kind: 'integer', accepted: 'an integer from 2 to 16', example: 3 },
    { name: 'q', label: 'field order q', kind: 'integer', accepted: 'a prime power from 2 up', example: 4 },
    {
      name: 'flat',
      label: 'dimension of the blocks',
      kind: 'integer',
      accepted: 'an integer from 1 to m − 1',
      example: 1,
    },
    {
      name: 'origin',
      label: 'origin',
      kind: 'choice',
      accepted: '"with" for every flat, "without" for the flats that miss the origin',
      choices: ORIGIN,
      example: 'with',
      optional: true,
    },
  ],
  source: {
    authors: 'Y. Kou, S. Lin, M. P. C. Fossorier',
    year: 2001,
    title: 'Low-density parity-check codes based on finite geometries: a rediscovery and new results',
    where: 'IEEE Trans. Inf. Theory 47, 2711–2736',
    part: 'Sections III and VI',
  },
  schema: z.strictObject({
    m: z.number().int().min(2).max(16),
    q: z.number().int().min(2).max(MAX_FLAT_POINTS),
    flat: z.number().int().min(1),
    origin: z.enum(ORIGIN).default('with'),
  }),
  require: (params) => {
    if (!primePowerOf(params.q)) throw new ParamError('q', params.q, 'a prime power');
    requireFlats(params, affineCounts(params));
  },
  *enumerate(window) {
    for (const params of flatsWithin(window, affineCounts)) {
      yield { ...params, origin: 'with' as const };
      yield { ...params, origin: 'without' as const };
    }
  },
  predict: (params) => (params.origin === 'with' ? predictAffine(params) : predictWithoutOrigin(params)),
  build: ({ m, q, flat, origin }) => (origin === 'with' ? affineFlats(m, q, flat) : flatsMissingOrigin(m, q, flat)),
});

function affineCounts({ m, q, flat }: FlatParams) {
  return {
    v: q ** m,
    b: gaussianBinomial(m, flat, q) * q ** (m - flat),
    k: q ** flat,
    r: gaussianBinomial(m, flat, q),
    lambda: gaussianBinomial(m - 1, flat - 1, q),
  };
}

/** Even q: the rank of PG(m,q) less that of the hyperplane at infinity (Hamada 1973). Odd q: everything. */
export function rankOfAffineFlats({ m, q, flat }: FlatParams): Graded<Enclosure> {
  if (q % 2 !== 0) return rankWithIrreducibleHeart(q ** m, q ** flat, 'AGL(m,q)');
  const rank = hamadaRank(m, q, flat) - hamadaRank(m - 1, q, flat);
  return exactly(rank, 'proved', 'rank of PG(m,q) less that of its hyperplane (Hamada 1973)', HAMADA);
}

function predictAffine(params: Params): DesignPrediction {
  const { m, q, flat } = params;
  const counts = affineCounts(params);
  const rank = rankOfAffineFlats(params);
  const codes = predictFlatCodes(counts, { rank, structure: { blocks: 'none', points: 'none' } });
  const shape = { v: counts.v, b: counts.b, k: counts.k, r: counts.r, resolvable: true, codes };
  // Three points of AG(m,2) are never on a line, so the flats of dimension two and more are 3-designs.
  if (q === 2 && flat >= 2) return { t: 3, ...shape, lambda: gaussianBinomial(m - 2, flat - 2, 2) };
  return { t: 2, ...shape, lambda: counts.lambda };
}

function predictWithoutOrigin(params: Params): DesignPrediction {
  const { m, q, flat } = params;
  const counts = {
    v: q ** m - 1,
    b: gaussianBinomial(m, flat, q) * (q ** (m - flat) - 1),
    k: q ** flat,
    r: gaussianBinomial(m, flat, q) - gaussianBinomial(m - 1, flat - 1, q),
  };
  const codes = predictPartialLinearCodes(counts, {
    girth: flat === 1 ? 6 : 4,
    rank: rankWithoutOrigin(params),
    commonBlocks: q ** (flat - 1) * gaussianBinomial(m - 2, flat - 1, q),
    structure: { blocks: 'cyclic', points: flat === m - 1 ? 'cyclic' : 'quasi-cyclic' },
  });
  return { t: 1, ...counts, lambda: counts.r, partialLinear: flat === 1, cyclic: true, codes };
}

/** Even q: one less than with the origin. Two flats through the origin in a common flat of the next dimension differ by
 *  flats that miss it (the plane's rank says so), hence all flats are spanned by those that miss it and one more.
 *  Odd q: everything. A word orthogonal to them has the same sum S on every hyperplane through the origin and none on
 *  the others, so all its Fourier coefficients are S, and it is supported on the origin. */
function rankWithoutOrigin(params: Params): Graded<Enclosure> {
  const whole = rankOfAffineFlats(params);
  return exactly(whole.value.lower - 1, 'proved', `one less than with the origin; ${whole.method}`, whole.source);
}
