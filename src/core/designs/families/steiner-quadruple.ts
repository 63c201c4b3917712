import { z } from 'zod';
import { InfeasibleError, LimitError } from '../../errors.ts';
import { designFromBlocks } from '../block-design.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { defineFamily } from '../family.ts';
import { exactly } from '../partial-linear-prediction.ts';
import { quadrupleSystem, quadruplesAreBuilt } from '../quadruple-systems/quadruples.ts';

const MAX_QUADRUPLE_POINTS = 128;

const HANANI = {
  authors: 'H. Hanani',
  year: 1960,
  title: 'On quadruple systems',
  where: 'Canad. J. Math. 12, 145–157',
};

/** Steiner quadruple systems S(3,4,v): every three of the v points in exactly one of v(v−1)(v−2)/24 quadruples.
 *  Powers of two give the Boolean systems AG(m,2).
 *  @throws InfeasibleError unless v ≡ 2 or 4 (mod 6); LimitError where neither doubling nor a base order reaches v. */
export const steinerQuadruple = defineFamily({
  id: 'steiner-quadruple',
  title: 'Steiner quadruple system',
  params: [
    {
      name: 'v',
      label: 'points v',
      kind: 'integer',
      accepted: `an integer ≡ 2 or 4 (mod 6) from 8 to ${MAX_QUADRUPLE_POINTS}`,
      example: 16,
    },
  ],
  source: HANANI,
  schema: z.strictObject({ v: z.number().int().min(8) }),
  require({ v }) {
    if (v % 6 !== 2 && v % 6 !== 4) {
      const above = [v + 1, v + 2, v + 3].find((x) => x % 6 === 2 || x % 6 === 4)!;
      const statement = `A Steiner quadruple system needs v ≡ 2 or 4 (mod 6); v = ${v} is not, the next that exists has v = ${above}.`;
      throw new InfeasibleError('divisibility', statement, HANANI, 'v');
    }
    if (v > MAX_QUADRUPLE_POINTS) throw new LimitError('Steiner quadruple system', v, MAX_QUADRUPLE_POINTS, 'points');
    if (!quadruplesAreBuilt(v)) {
      throw new LimitError(
        'Steiner quadruple system (exists by Hanani 1960, not built here); nearest below',
        v,
        nearestBelow(v),
        'points',
      );
    }
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (let v = 8; v <= Math.min(maxPoints, MAX_QUADRUPLE_POINTS) && quadruples(v) <= maxBlocks; v += 2) {
      if (v % 6 !== 0 && quadruplesAreBuilt(v)) yield { v };
    }
  },
  predict({ v }) {
    const counts = { v, b: quadruples(v), k: 4, r: ((v - 1) * (v - 2)) / 6, lambda: (v - 2) / 2 };
    // AG(m,2): the words that meet every plane evenly are the affine functions, so the rank is v − m − 1.
    const boolean = Number.isInteger(Math.log2(v));
    const rank = boolean
      ? exactly(v - Math.log2(v) - 1, 'proved', 'dual of the Reed–Muller code of order 1')
      : undefined;
    return { t: 3, ...counts, lambda: 1, codes: predictTwoDesignCodes(counts, { rank }) };
  },
  build({ v }) {
    const blocks = quadrupleSystem(v);
    if (!blocks) throw new LimitError('search of a quadruple system', v, nearestBelow(v), 'points');
    if (blocks.length !== quadruples(v))
      throw new Error(`a quadruple system on ${v} points has ${quadruples(v)} blocks`);
    return designFromBlocks(v, blocks);
  },
});

const quadruples = (v: number) => (v * (v - 1) * (v - 2)) / 24;

function nearestBelow(v: number): number {
  let below = v - 1;
  while (!(below % 6 === 2 || below % 6 === 4) || !quadruplesAreBuilt(below)) below--;
  return below;
}
