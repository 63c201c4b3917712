import type { Citation } from '../../errors.ts';
import { binomialExact } from '../subset-rank.ts';

/** Parameters asked about: every t-subset of v points in exactly lambda blocks of size k. */
export interface DesignQuery {
  t: number;
  v: number;
  k: number;
  lambda: number;
  /** Asks for blocks that fall into parallel classes. */
  resolvable?: boolean;
}

/** One theorem. It may forbid parameters, or grant that a design exists; of all others it says nothing. The answer is
 *  the theorem applied to these numbers, in one sentence. */
export interface FeasibilityRule {
  id: string;
  source: Citation;
  forbids?(query: DesignQuery): string | null;
  grants?(query: DesignQuery): string | null;
}

/** Blocks on i given points, λ·C(v−i, t−i) / C(k−i, t−i); null when that is not a whole number. */
export function blocksOnPoints({ t, v, k, lambda }: DesignQuery, i: number): bigint | null {
  const top = BigInt(lambda) * binomialExact(v - i, t - i);
  const bottom = binomialExact(k - i, t - i);
  return top % bottom === 0n ? top / bottom : null;
}

/** "2-(43,7,1)". */
export const nameOf = ({ t, v, k, lambda }: DesignQuery) => `${t}-(${v},${k},${lambda})`;

/** The order k − λ of a symmetric design, or null when the number of blocks is not the number of points. */
export function symmetricOrder(query: DesignQuery): number | null {
  const { t, v, k, lambda } = query;
  return t === 2 && k < v && lambda * (v - 1) === k * (k - 1) ? k - lambda : null;
}
