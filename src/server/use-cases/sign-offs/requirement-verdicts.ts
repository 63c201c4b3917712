import type { Code } from '@/api/codes.ts';
import type { Requirements } from '@/api/projects.ts';
import type { Point } from '@/api/runs.ts';
import type { RequirementVerdict } from '@/api/sign-offs.ts';

/** Every stated requirement, held against the code and its measured points. A rate is met only when the upper limit of
 *  a point at the stated channel (any channel, where none is stated) is within the target; what nobody measured is
 *  undecided. */
export function requirementVerdicts(
  requirements: Requirements,
  code: Pick<Code, 'n' | 'k' | 'columnWeights' | 'properties'>,
  points: readonly Point[],
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
    ...rateVerdict('target FER', r.targetFer, r, points, 'interval', 1),
    ...rateVerdict('target BER', r.targetBer, r, points, 'berInterval', 1),
    // JEDEC JESD218: UBER is FER over the information bits a frame.
    ...rateVerdict('target UBER', r.targetUber, r, points, 'interval', k),
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

function rateVerdict(
  requirement: string,
  asked: number | undefined,
  { channel, decoder }: Requirements,
  points: readonly Point[],
  interval: 'interval' | 'berInterval',
  divisor: number,
): RequirementVerdict[] {
  if (asked === undefined) return [];
  const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);
  const fitting = points.filter(
    (point) =>
      point.tally.frames > 0 &&
      (channel === undefined || same(point.channel, channel)) &&
      (decoder === undefined || same(point.decoder, decoder)),
  );
  const target = asked * divisor;
  if (fitting.length === 0) {
    const method = 'between 0 and 1: no point was measured with the channel and decoder required';
    return [{ requirement, asked, outcome: 'undecided', grade: 'bounded', method }];
  }
  const best = fitting.reduce((a, b) => (b[interval].upper < a[interval].upper ? b : a));
  const { lower, upper } = best[interval];
  const outcome = upper <= target ? 'met' : fitting.every((p) => p[interval].lower > target) ? 'missed' : 'undecided';
  const { frames, frameErrors } = best.tally;
  const scale = (x: number) => (x / divisor).toPrecision(3);
  const method = `${frameErrors} frame errors in ${frames} frames with ${best.decoder.kind}: ${scale(lower)} to ${scale(upper)} at level ${best.level}`;
  return [{ requirement, asked, outcome, grade: 'sampled', method }];
}
