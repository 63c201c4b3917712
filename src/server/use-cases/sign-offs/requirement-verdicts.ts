import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import type { RequirementVerdict } from '@/api/sign-offs.ts';
import { rateVerdict } from '@/core/statistics/rate-verdict.ts';
import type { RateEvidence } from './rate-evidence.ts';

/** Every stated requirement, held against the code and what is known of its error rates. A rate is met only when the upper
 *  limit of something known at the stated channel (any channel, where none is stated) is within the target; what nobody
 *  measured or bounded is undecided. */
export function requirementVerdicts(
  requirements: Requirements,
  code: Pick<Code, 'n' | 'k' | 'columnWeights' | 'properties'>,
  evidence: readonly RateEvidence[],
): RequirementVerdict[] {
  const { n, k, columnWeights } = code;
  const r = requirements;
  const counted = (
    requirement: string,
    asked: number | undefined,
    holds: (asked: number) => boolean,
    method: string,
  ) =>
    asked === undefined
      ? []
      : [{ requirement, asked, outcome: holds(asked) ? 'met' : 'missed', grade: 'computed', method } as const];
  return [
    ...counted('least length', r.lengthMin, (x) => n >= x, `n = ${n}, columns counted`),
    ...counted('greatest length', r.lengthMax, (x) => n <= x, `n = ${n}, columns counted`),
    ...counted('least rate', r.rateMin, (x) => k / n >= x, `k/n = ${k}/${n}`),
    ...counted('payload bits', r.payloadBits, (x) => k >= x, `k = ${k}`),
    ...counted('parity budget, bits', r.parityBits, (x) => n - k <= x, `n − k = ${n - k}`),
    ...counted(
      'greatest column weight',
      r.columnWeightMax,
      (x) => (columnWeights.at(-1)?.[0] ?? 0) <= x,
      `largest column weight ${columnWeights.at(-1)?.[0] ?? 0}, counted`,
    ),
    ...structureVerdict(r, code),
    ...verdictOnRate('target FER', r.targetFer, evidence, 'fer', 1),
    ...verdictOnRate('target BER', r.targetBer, evidence, 'ber', 1),
    // JEDEC JESD218: UBER is FER over the information bits a frame.
    ...verdictOnRate('target UBER', r.targetUber, evidence, 'fer', Math.max(1, k)),
  ];
}

function structureVerdict({ structure }: Requirements, { properties }: Pick<Code, 'properties'>): RequirementVerdict[] {
  if (structure === undefined || structure === 'any') return [];
  const known = properties.find(({ key }) => key === 'structure');
  const isCyclic = known?.text === 'cyclic';
  const outcome = isCyclic ? 'met' : structure === 'cyclic' ? 'missed' : 'undecided';
  const method = isCyclic ? known.method : (known?.text ?? 'not analysed');
  return [{ requirement: 'structure', asked: structure, outcome, grade: known?.grade ?? 'bounded', method }];
}

function verdictOnRate(
  requirement: string,
  asked: number | undefined,
  evidence: readonly RateEvidence[],
  rate: 'fer' | 'ber',
  divisor: number,
): RequirementVerdict[] {
  if (asked === undefined) return [];
  if (evidence.length === 0) {
    const method = 'between 0 and 1: no point was measured with the channel and decoder required, nor weights bounded';
    return [{ requirement, asked, outcome: 'undecided', grade: 'bounded', method }];
  }
  const target = asked * divisor;
  const best = evidence.reduce((a, b) => (b[rate].upper < a[rate].upper ? b : a));
  const isAbove = evidence.every((known) => rateVerdict(known[rate], target) === 'above');
  const outcome = rateVerdict(best[rate], target) === 'met' ? 'met' : isAbove ? 'missed' : 'undecided';
  const scale = (x: number) => (x / divisor).toPrecision(3);
  const { lower, upper } = best[rate];
  const method = `${best.words}: ${scale(lower)} to ${scale(upper)} at level ${best.level}`;
  return [{ requirement, asked, outcome, grade: best.grade, method }];
}
