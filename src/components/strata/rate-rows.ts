import type { CurvePoint } from '@/client/curves/curve.ts';
import { isRound } from '@/client/strata/round-crossovers.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { fractionsByWeight } from '@/core/simulation/stratified-rate.ts';
import { type Contribution, contributions } from '@/core/simulation/stratum-planning.ts';

export interface RateRow {
  point: CurvePoint;
  /** The weights that make up the most of the upper limit there, most first. */
  heaviest: Contribution[];
}

const MOST_SHOWN = 8;

/** The curve in figures at 1, 2 and 5 of each decade and at the target. */
export function rateRows({ group, strata, curve }: StrataEvidence, target: number | null): RateRow[] {
  if (curve.points.length === 0) return [];
  const fractions = fractionsByWeight(strata, group.n, group.level);
  const round = curve.points.filter(({ p }) => isRound(p));
  const isListed = round.some(({ p }) => p === target);
  const shown = target === null || isListed ? round : [...round, curve.at(target)];
  return shown
    .sort((a, b) => b.p - a.p)
    .map((point) => ({ point, heaviest: contributions(fractions, point.p, MOST_SHOWN) }));
}
