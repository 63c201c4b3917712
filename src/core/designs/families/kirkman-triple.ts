import { z } from 'zod';
import { InfeasibleError, LimitError } from '../../errors.ts';
import { type BlockDesign, designFromBlocks } from '../block-design.ts';
import { defineFamily } from '../family.ts';
import { kirkmanTriples } from '../kirkman/recursive.ts';
import { predictTripleSystem } from '../triple-systems/prediction.ts';

const MAX_KIRKMAN_POINTS = 99;

const SOURCE = {
  authors: 'D. K. Ray-Chaudhuri, R. M. Wilson',
  year: 1971,
  title: 'Solution of Kirkman’s schoolgirl problem',
  where: 'Proc. Symp. Pure Math. 19, 187–203',
};

/** Kirkman triple systems: Steiner triple systems whose triples fall into (v−1)/2 parallel classes, given in `classes`.
 *  @throws InfeasibleError unless v ≡ 3 (mod 6); LimitError above 99. */
export const kirkmanTriple = defineFamily({
  id: 'kirkman-triple',
  title: 'Kirkman triple system',
  params: [
    {
      name: 'v',
      label: 'points v',
      kind: 'integer',
      accepted: `an integer ≡ 3 (mod 6) from 9 to ${MAX_KIRKMAN_POINTS}`,
      example: 15,
    },
  ],
  source: SOURCE,
  schema: z.strictObject({ v: z.number().int().min(9) }),
  require({ v }) {
    if (v % 6 !== 3) {
      const below = v - ((v + 3) % 6);
      const statement = `A Kirkman triple system needs v ≡ 3 (mod 6); v = ${v} is not. The nearest have v = ${below} and v = ${below + 6}.`;
      throw new InfeasibleError('divisibility', statement, SOURCE, 'v');
    }
    if (v > MAX_KIRKMAN_POINTS) {
      throw new LimitError('Kirkman triple system (exists for every v ≡ 3 mod 6)', v, MAX_KIRKMAN_POINTS, 'points');
    }
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (let v = 9; v <= Math.min(maxPoints, MAX_KIRKMAN_POINTS) && (v * (v - 1)) / 6 <= maxBlocks; v += 6) yield { v };
  },
  predict: ({ v }) => ({ ...predictTripleSystem({ v, method: 'kirkman' }), resolvable: true }),
  build: ({ v }) => buildKirkman(v),
});

function buildKirkman(v: number): BlockDesign {
  const resolved = kirkmanTriples(v);
  if (!resolved) throw new LimitError('Kirkman triple system', v, MAX_KIRKMAN_POINTS, 'points');
  if (resolved.length !== (v - 1) / 2 || resolved.some((triples) => triples.length !== v / 3)) {
    throw new Error(`a Kirkman system on ${v} points has ${(v - 1) / 2} classes of ${v / 3} triples`);
  }
  const classes = Uint32Array.from(resolved.flatMap((triples, c) => triples.map(() => c)));
  return designFromBlocks(v, resolved.flat(), { classes });
}
