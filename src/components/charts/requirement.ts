import type { Requirements } from '@/api/projects.ts';
import type { Curve, RateKind } from '@/client/curves/curve.ts';
import type { Enclosure } from '@/core/evidence.ts';
import { rateVerdict } from '@/core/statistics/rate-verdict.ts';
import type { Requirement } from './error-rate-chart/domain.ts';
import { parameterText, scientific } from './rate-text.ts';

/** What the project requires of a rate, ready for a chart. A target on UBER asks FER ≤ UBER · k (JEDEC JESD218: UBER is
 *  FER over the information bits a frame) and can be drawn when all curves have the same k. */
export function requirementOf(
  requirements: Requirements | null | undefined,
  kind: RateKind,
  curves: readonly Pick<Curve, 'k'>[],
): Requirement | null {
  if (!requirements) return null;
  const p = requirements.channel?.kind === 'bsc' ? requirements.channel.p : null;
  const at = p === null ? '' : ` at p = ${parameterText(p)}`;
  const stated = kind === 'fer' ? requirements.targetFer : requirements.targetBer;
  if (stated !== undefined) {
    const shortLabel = `${kind.toUpperCase()} ≤ ${targetText(stated)}`;
    return { kind, target: stated, p, label: `required: ${shortLabel}${at}`, shortLabel };
  }
  const k = curves[0]?.k;
  if (kind === 'ber' || requirements.targetUber === undefined || k === undefined) return null;
  if (curves.some((curve) => curve.k !== k)) return null;
  const target = requirements.targetUber * k;
  const shortLabel = `UBER ≤ ${targetText(requirements.targetUber)}`;
  return { kind, target, p, label: `required: ${shortLabel} (FER ≤ ${targetText(target)})${at}`, shortLabel };
}

/** "10⁻¹⁵", "2 × 10⁻⁵", "1.9 × 10⁻¹³". */
const targetText = (x: number): string => {
  const digits = Number(x.toPrecision(2)) === Number(x.toPrecision(1)) ? 1 : 2;
  return scientific(x, digits);
};

export type Verdict = 'met' | 'above' | 'undecided' | 'no point';

/** How a measured point stands to the target; of a curve without a point there nothing is said. */
export const verdictOn = (point: Enclosure | undefined, target: number): Verdict =>
  point === undefined ? 'no point' : rateVerdict(point, target);
