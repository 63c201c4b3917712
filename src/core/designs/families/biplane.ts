import { z } from 'zod';
import { InfeasibleError, LimitError } from '../../errors.ts';
import { type BlockDesign, designFromBlocks } from '../block-design.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { developCyclically } from '../develop.ts';
import { defineFamily } from '../family.ts';

const SOURCE = {
  authors: 'D. R. Hughes, F. C. Piper',
  year: 1985,
  title: 'Design Theory',
  where: 'Cambridge University Press',
  part: 'biplanes',
};

/** Cyclic difference sets: complements of the plane of order 2, squares modulo 11, fourth powers modulo 37. */
const CYCLIC_SETS: Record<number, number[]> = {
  4: [0, 3, 5, 6],
  5: [1, 3, 4, 5, 9],
  9: [1, 7, 9, 10, 12, 16, 26, 33, 34],
};

/** Biplanes, symmetric 2-(1 + k(k−1)/2, k, 2) designs, from difference sets: k = 4, 5, 9 cyclic, k = 6 over Z₂⁴.
 *  k = 7, 8, 10 are impossible (Bruck–Ryser–Chowla); k = 11 exists but has no difference set and is not built here. */
export const biplane = defineFamily({
  id: 'biplane',
  title: 'Biplane',
  params: [{ name: 'k', label: 'block size k', kind: 'integer', accepted: '4, 5, 6 or 9', example: 9 }],
  source: SOURCE,
  schema: z.strictObject({ k: z.number().int().min(4).max(11) }),
  require({ k }) {
    if (k === 7 || k === 8 || k === 10) {
      const statement = `No biplane has k = ${k}: its order ${k - 2} fails the Bruck–Ryser–Chowla condition on ${points(k)} points.`;
      throw new InfeasibleError('bruck-ryser-chowla', statement, SOURCE, 'k');
    }
    if (k === 11)
      throw new LimitError('biplanes from difference sets (k = 11 exists, not built here)', 11, 9, 'points a block');
  },
  *enumerate({ maxPoints, maxBlocks }) {
    for (const k of [4, 5, 6, 9]) if (points(k) <= Math.min(maxPoints, maxBlocks)) yield { k };
  },
  predict({ k }) {
    const counts = { v: points(k), b: points(k), k, r: k, lambda: 2 };
    const structure = k === 6 ? 'none' : 'cyclic';
    return { t: 2, ...counts, cyclic: k !== 6, codes: predictTwoDesignCodes(counts, { structure }) };
  },
  build: ({ k }) => (k === 6 ? elementaryAbelianBiplane() : developCyclically(points(k), [CYCLIC_SETS[k]!])),
});

function points(k: number): number {
  return 1 + (k * (k - 1)) / 2;
}

/** Over Z₂⁴ the set {0000, 0001, 0010, 0100, 1000, 1111}: its 15 sums of two cover every non-zero vector, each in both orders. */
function elementaryAbelianBiplane(): BlockDesign {
  const set = [0, 1, 2, 4, 8, 15];
  return designFromBlocks(
    16,
    Array.from({ length: 16 }, (_, s) => set.map((x) => x ^ s)),
  );
}
