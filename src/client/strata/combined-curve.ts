import {
  type Fractions,
  fractionsByWeight,
  type RateBounds,
  ratesAt,
  type StratifiedRate,
  type Stratum,
} from '@/core/simulation/stratified-rate.ts';
import type { CombinedCurve, CurvePoint, Estimate } from '../curves/curve.ts';
import { roundCrossovers } from './round-crossovers.ts';
import type { StratumGroup } from './stratum-groups.ts';

/** Rates below this are not drawn: the law of the weights keeps its digits as far down, and nobody asks for less. */
export const LEAST_RATE = 1e-30;
const LEAST_P = 1e-12;
/** Between two round values of p. */
const STEPS = 6;

/** The error rate over all p that weight strata give, with limits that hold at all p at once. */
export function combinedCurve(group: StratumGroup, strata: readonly Stratum[]): CombinedCurve {
  const { key, runId, codeId, codeLabel, n, k, decoder, level } = group;
  const curve = { key, runId, codeId, codeLabel, n, k, decoder };
  const fractions = fractionsByWeight(strata, n, level);
  const point = pointMaker(group, strata);
  const at = (p: number) => point(p, ratesAt(fractions, [p])[0]!);
  if (!strata.some(({ frames }) => frames > 0)) return { ...curve, points: [], at };
  const heaviest = Math.max(...strata.map(({ weight }) => weight), 1);
  const ps = crossovers(fractions, Math.min(0.5, (1.5 * heaviest) / n));
  const rates = ratesAt(fractions, ps);
  return { ...curve, points: ps.map((p, i) => point(p, rates[i]!)), at };
}

function pointMaker(group: StratumGroup, strata: readonly Stratum[]): (p: number, rate: StratifiedRate) => CurvePoint {
  const sum = (of: (stratum: Stratum) => number) => strata.reduce((total, stratum) => total + of(stratum), 0);
  const counts = {
    frames: sum(({ frames }) => frames),
    frameErrors: sum(({ frameErrors }) => frameErrors),
    bitErrors: sum(({ bitErrors = 0 }) => bitErrors),
    undetected: group.points.reduce((total, { tally }) => total + tally.undetected, 0),
    iterationsMean: Number.NaN,
    done: group.points.every(({ done }) => done),
    level: group.level,
    grade: 'bounded' as const,
  };
  return (p, rate) => ({
    ...counts,
    pointId: `${group.key}@${p}`,
    p,
    fer: estimateOf(rate),
    // A failed frame has one wrong bit at least and n at most.
    ber: estimateOf(rate.ber ?? { estimate: 0, lower: rate.lower / group.n, upper: rate.upper }),
  });
}

const estimateOf = ({ estimate, lower, upper }: RateBounds): Estimate => ({
  value: estimate > 0 ? estimate : null,
  lower,
  upper,
});

/** From where the heaviest weight tried is the usual one down to where even the upper limit is of no more account;
 *  1, 2 and 5 of each decade are among them. */
function crossovers(fractions: readonly Fractions[], top: number): number[] {
  const coarse = roundCrossovers(LEAST_P, top);
  const rates = ratesAt(fractions, coarse);
  const end = rates.findIndex(({ upper }) => upper < LEAST_RATE);
  const round = coarse.slice(0, end < 0 ? undefined : end + 1);
  const ends = round[0] === top ? round : [top, ...round];
  return ends.flatMap((p, i) => {
    const next = ends[i + 1];
    if (next === undefined) return [p];
    return Array.from({ length: STEPS }, (_, step) => p * (next / p) ** (step / STEPS));
  });
}
