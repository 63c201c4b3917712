import { rankOfTwoDesign } from '../code-prediction.ts';
import type { DesignPrediction } from '../family.ts';
import { predictFlatCodes } from './flat-codes.ts';
import { rankWithIrreducibleHeart } from './odd-rank.ts';

export function circleCounts(q: number, d: number) {
  const Q = q ** d;
  return {
    v: Q + 1,
    b: ((Q + 1) * Q * (Q - 1)) / ((q + 1) * q * (q - 1)),
    k: q + 1,
    r: (Q * (Q - 1)) / (q * (q - 1)),
    /** Blocks on two points. */
    lambda: (Q - 1) / (q - 1),
  };
}

/** S(3, q+1, q^d+1). Rank: for even q, r − λ₂ is odd; for odd q, PGL(2,q^d) has an irreducible heart modulo 2. */
export function predictCircles(q: number, d: number): DesignPrediction {
  const counts = circleCounts(q, d);
  const rank = q % 2 === 0 ? rankOfTwoDesign(counts) : rankWithIrreducibleHeart(counts.v, counts.k, 'PGL(2,q^d)');
  const codes = predictFlatCodes(counts, { rank, structure: { blocks: 'none', points: 'none' } });
  return { t: 3, ...counts, lambda: 1, codes };
}
