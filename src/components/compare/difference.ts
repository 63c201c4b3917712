import type { Curve, CurvePoint } from '@/client/curves/curve.ts';
import { compareRates, type RateComparison } from '@/core/statistics/compare-rates.ts';
import { levelText, scientific } from '../charts/rate-text.ts';

/** Points of both curves at the same p, worst channel first. */
export function commonPoints(
  first: Pick<Curve, 'points'>,
  second: Pick<Curve, 'points'>,
): (readonly [CurvePoint, CurvePoint])[] {
  return first.points.flatMap((point) => {
    const twin = second.points.find(({ p }) => Math.abs(p / point.p - 1) < 1e-9);
    return twin ? [[point, twin] as const] : [];
  });
}

/** Whether two curves met the same error patterns: seed and length settle them, whatever decoded them. */
export function sharesFrames(
  first: Pick<Curve, 'runId' | 'n'>,
  second: Pick<Curve, 'runId' | 'n'>,
  seedOf: (runId: string) => string | undefined,
): boolean {
  const seed = seedOf(first.runId);
  return seed !== undefined && seed === seedOf(second.runId) && first.n === second.n;
}

/** The comparison with its verdict in words. */
export function differenceText(
  first: string,
  second: string,
  [a, b]: readonly [CurvePoint, CurvePoint],
  level: number,
): Pick<RateComparison, 'ratio' | 'pValue'> & { verdict: string } {
  const count = ({ frames, frameErrors }: CurvePoint) => ({ frames, errors: frameErrors });
  const comparison = compareRates(count(a), count(b), level);
  return { ...comparison, verdict: verdictText(comparison.verdict, first, second, level) };
}

function verdictText(verdict: RateComparison['verdict'], first: string, second: string, level: number): string {
  const at = `at level ${levelText(level)}`;
  if (verdict === 'undecided') return `The counts do not tell ${first} and ${second} apart, ${at}.`;
  const [better, worse] = verdict === 'first' ? [first, second] : [second, first];
  return `${better} fails less often than ${worse}, ${at}.`;
}

/** "0.42 (0.31 – 0.57)". */
export function ratioText({ estimate, lower, upper }: RateComparison['ratio']): string {
  if (Number.isNaN(estimate)) return 'not known, no error in either';
  return `${plain(estimate)} (${plain(lower)} – ${plain(upper)})`;
}

const plain = (x: number): string => {
  if (x === Number.POSITIVE_INFINITY) return '∞';
  if (x === 0) return '0';
  return x >= 0.01 && x < 1000 ? String(Number(x.toPrecision(3))) : scientific(x);
};

/** What the test gives at its smallest is a bound. */
const LEAST_P_VALUE = 1e-25;

export const pValueText = (p: number): string => {
  if (p <= LEAST_P_VALUE) return `<\u202f${scientific(LEAST_P_VALUE, 1)}`;
  return p >= 0.001 ? p.toFixed(3) : scientific(p);
};
