import { z } from 'zod';
import { gaussianBinomial, gcd, primePowerOf } from '../../algebra/integers.ts';
import { ParamError } from '../../errors.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { developBaseBlock } from '../geometry/cyclic-design.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { type FlatParams, flatsWithin, MAX_FLAT_POINTS, requireFlats } from '../geometry/flat-limits.ts';
import { projectiveFlats } from '../geometry/flats.ts';
import { HAMADA, hamadaRank } from '../geometry/hamada.ts';
import { rankWithIrreducibleHeart } from '../geometry/odd-rank.ts';
import { singerDifferenceSet } from '../geometry/singer.ts';
import { exactly } from '../partial-linear-prediction.ts';

/** Points against d-flats of PG(m,q), in Singer order. Source: Hirschfeld 1998, ch. 3; Singer 1938 for the order. */
export const projectiveGeometry = defineFamily({
  id: 'projective-geometry',
  title: 'Flats of a projective geometry PG(m,q)',
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
  ],
  source: {
    authors: 'J. W. P. Hirschfeld',
    year: 1998,
    title: 'Projective Geometries over Finite Fields',
    where: 'Oxford University Press, 2nd ed.',
    part: 'Chapter 3',
  },
  schema: z.strictObject({
    m: z.number().int().min(2).max(16),
    q: z.number().int().min(2).max(MAX_FLAT_POINTS),
    flat: z.number().int().min(1),
  }),
  require: (params) => {
    if (!primePowerOf(params.q)) throw new ParamError('q', params.q, 'a prime power');
    requireFlats(params, projectiveCounts(params));
  },
  enumerate: (window) => flatsWithin(window, projectiveCounts),
  predict: predictProjective,
  build: ({ m, q, flat }) =>
    // A plane's field may be too large for tables, and one base block is all it needs.
    m === 2 ? developBaseBlock(q * q + q + 1, singerDifferenceSet(q, 2)) : projectiveFlats(m, q, flat),
});

function projectiveCounts({ m, q, flat }: FlatParams) {
  return {
    v: (q ** (m + 1) - 1) / (q - 1),
    b: gaussianBinomial(m + 1, flat + 1, q),
    k: (q ** (flat + 1) - 1) / (q - 1),
    r: gaussianBinomial(m, flat, q),
    lambda: gaussianBinomial(m - 1, flat - 1, q),
  };
}

function predictProjective(params: FlatParams): DesignPrediction {
  const { m, q, flat } = params;
  const counts = projectiveCounts(params);
  const rank =
    q % 2 === 0
      ? exactly(hamadaRank(m, q, flat), 'proved', 'sum over sequences (Hamada 1973)', HAMADA)
      : rankWithIrreducibleHeart(counts.v, counts.k, 'PSL(m+1,q)');
  // Orbits of flats under the Singer cycle are all full exactly when m + 1 and flat + 1 are coprime.
  const points = flat === m - 1 ? 'cyclic' : gcd(m + 1, flat + 1) === 1 ? 'quasi-cyclic' : 'none';
  return {
    t: 2,
    ...counts,
    cyclic: true,
    codes: predictFlatCodes(counts, { rank, structure: { blocks: 'cyclic', points } }),
  };
}
