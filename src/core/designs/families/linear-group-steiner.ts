import { z } from 'zod';
import { galoisField } from '../../algebra/galois-field.ts';
import { binomial } from '../../algebra/integers.ts';
import { ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign } from '../block-design.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { BlockList } from '../geometry/block-list.ts';
import { projectiveLineGenerators } from '../geometry/circles.ts';
import { predictFlatCodes } from '../geometry/flat-codes.ts';
import { orbitKeys, pointsOfKey } from '../geometry/line-group.ts';
import { LINEAR_GROUP_SYSTEMS } from '../geometry/linear-group-systems.ts';
import { rankWithIrreducibleHeart } from '../geometry/odd-rank.ts';
import { exactly } from '../partial-linear-prediction.ts';

const POINTS = Object.keys(LINEAR_GROUP_SYSTEMS).map(Number);

/** Steiner 5-designs with PSL(2,v−1) acting: S(5,6,24), S(5,7,28), S(5,6,48), S(5,6,84). Source: Denniston 1976. */
export const linearGroupSteiner = defineFamily({
  id: 'linear-group-steiner',
  title: 'Steiner 5-design from orbits of PSL(2,q)',
  params: [{ name: 'v', label: 'points v', kind: 'integer', accepted: `one of ${POINTS.join(', ')}`, example: 24 }],
  source: {
    authors: 'R. H. F. Denniston',
    year: 1976,
    title: 'Some new 5-designs',
    where: 'Bull. London Math. Soc. 8, 263–267',
  },
  schema: z.strictObject({ v: z.number().int() }),
  require: ({ v }) => {
    if (!LINEAR_GROUP_SYSTEMS[v]) throw new ParamError('v', v, `one of ${POINTS.join(', ')}`);
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const v of POINTS) if (v <= maxPoints && systemCounts(v).b <= maxBlocks) yield { v };
  },
  predict: ({ v }) => predictSystem(v),
  build: ({ v }) => buildSystem(v),
});

function systemCounts(v: number) {
  const { k } = LINEAR_GROUP_SYSTEMS[v]!;
  const through = (i: number) => binomial(v - i, 5 - i) / binomial(k - i, 5 - i);
  return { v, b: through(0), k, r: through(1), lambda: through(2) };
}

function predictSystem(v: number): DesignPrediction {
  const counts = systemCounts(v);
  const codes = predictFlatCodes(counts, { rank: rankOfSystem(v), structure: { blocks: 'none', points: 'none' } });
  return { t: 5, ...counts, lambda: 1, codes };
}

/** For q = 27 and 83, ≡ 3 (mod 8), the heart is irreducible. For q = 23 and 47 the invariant codes are also those between
 *  the extended quadratic-residue codes, whose distances 8 and 12 leave no room for a block of six. */
function rankOfSystem(v: number): Graded<Enclosure> {
  if ((v - 1) % 8 === 3) return rankWithIrreducibleHeart(v, systemCounts(v).k, 'PSL(2,q)');
  return exactly(v - 1, 'proved', 'blocks of six lie in no quadratic-residue code, of distance 8 or 12');
}

function buildSystem(v: number): BlockDesign {
  const { k, semilinear, baseBlocks } = LINEAR_GROUP_SYSTEMS[v]!;
  const field = galoisField(v - 1);
  const list = new BlockList(v, systemCounts(v).b, k);
  const block = new Uint32Array(k);
  for (const key of orbitKeys(field, baseBlocks, semilinear)) {
    pointsOfKey(key, v, block);
    list.add(block);
  }
  return list.finish({ symmetry: projectiveLineGenerators(field, field.exp[2]!) });
}
