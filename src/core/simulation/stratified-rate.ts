import { ParamError } from '../errors.ts';
import type { Enclosure, Grade } from '../evidence.ts';
import { checkedLevel, lowerLimit, upperLimit } from '../statistics/binomial-interval.ts';
import { binomialLaw, logFactorials } from '../statistics/binomial-law.ts';
import { boundedMeanInterval } from '../statistics/mean-interval.ts';

/** What is known of one weight: every pattern of it tried (`computed`), none failing by a theorem (`proved`), or a
 *  sample, which is what no grade means. */
export interface Stratum {
  weight: number;
  frames: number;
  frameErrors: number;
  bitErrors?: number;
  bitErrorsSquared?: number;
  grade?: Exclude<Grade, 'bounded'>;
}

export interface RateBounds extends Enclosure {
  estimate: number;
}

export interface StratifiedRate extends RateBounds {
  /** Of wrong bits among all n. Present when every stratum with failures has its bit errors. */
  ber?: RateBounds;
}

/** The share of failing patterns, and of wrong bits, at one weight. */
export interface Fractions {
  frames: RateBounds;
  bits: RateBounds | null;
}

const none: RateBounds = { estimate: 0, lower: 0, upper: 0 };
const unknown: RateBounds = { estimate: 1, lower: 0, upper: 1 };

/** Weights up to a guaranteed radius, at which no pattern fails. */
export function provedStrata(radius: number): Stratum[] {
  return Array.from({ length: radius + 1 }, (_, weight) => ({ weight, frames: 0, frameErrors: 0, grade: 'proved' }));
}

/** FER(p) = Σ_w P(W = w)·φ_w for independent errors, from what is known of φ_w. The limits hold together with the stated
 *  probability at any one p, and at all p at once: each of the S sampled strata has exact limits that miss with
 *  probability (1 − level)/S (with bit errors: half of it for the failing share, half for their number), and a weight
 *  not given counts as 0 below and 1 above. The estimate is no part of that guarantee: a weight not given takes the
 *  share of the next heavier given one, and 1 above the heaviest.
 *  @throws ParamError on counts that cannot be, a weight given twice or over n, or p outside (0, 1). */
export function stratifiedRate(strata: readonly Stratum[], n: number, p: number, level: number): StratifiedRate {
  return stratifiedCurve(strata, n, [p], level)[0]!;
}

/** The same for many p at little more cost. */
export function stratifiedCurve(
  strata: readonly Stratum[],
  n: number,
  ps: readonly number[],
  level: number,
): StratifiedRate[] {
  return ratesAt(fractionsByWeight(strata, n, level), ps);
}

/** The same from the shares of each weight, 0 to n, for whoever comes back for more p. */
export function ratesAt(fractions: readonly Fractions[], ps: readonly number[]): StratifiedRate[] {
  const n = fractions.length - 1;
  const haveBits = fractions.every(({ bits }) => bits !== null);
  const logs = logFactorials(n);
  return ps.map((p) => {
    const law = weightLaw(n, p, logs);
    const rate = combine(law, (w) => fractions[w]!.frames);
    return haveBits ? { ...rate, ber: combine(law, (w) => fractions[w]!.bits!) } : rate;
  });
}

/** P(W = w) for independent errors of probability p. */
export function weightLaw(n: number, p: number, logs?: Float64Array): Float64Array {
  if (!(p > 0 && p < 1)) throw new ParamError('p', p, 'a probability above 0 and below 1');
  return binomialLaw(n, p, logs);
}

/** All terms are positive, so that the sums are right to a few units in the thirteenth place. */
function combine(law: Float64Array, fraction: (w: number) => RateBounds): RateBounds {
  const sum = { estimate: 0, lower: 0, upper: 0 };
  law.forEach((probability, w) => {
    const { estimate, lower, upper } = fraction(w);
    sum.estimate += probability * estimate;
    sum.lower += probability * lower;
    sum.upper += probability * upper;
  });
  return { estimate: Math.min(1, sum.estimate), lower: Math.min(1, sum.lower), upper: Math.min(1, sum.upper) };
}

/** φ_w with its limits for w = 0 … n; weight 0 fails never, its pattern being none. */
export function fractionsByWeight(strata: readonly Stratum[], n: number, level: number): Fractions[] {
  const sampled = strata.filter((stratum) => gradeOf(stratum) === 'sampled').length;
  const allowance = (1 - checkedLevel(level)) / Math.max(1, sampled);
  const known = new Map<number, Fractions>();
  for (const stratum of strata) {
    refuse(stratum, n, known.has(stratum.weight));
    known.set(stratum.weight, {
      frames: failingShare(stratum, allowance / 2),
      bits: wrongShare(stratum, n, allowance),
    });
  }
  if (!known.has(0)) known.set(0, { frames: none, bits: none });
  const fractions: Fractions[] = Array.from({ length: n + 1 });
  let heavier: Fractions = { frames: unknown, bits: unknown };
  for (let w = n; w >= 0; w--) {
    const given = known.get(w);
    if (given) heavier = given;
    fractions[w] = given ?? {
      frames: { ...unknown, estimate: heavier.frames.estimate },
      bits: heavier.bits && { ...unknown, estimate: heavier.bits.estimate },
    };
  }
  return fractions;
}

function gradeOf(stratum: Stratum): Grade {
  return stratum.grade ?? 'sampled';
}

/** The exact share of an enumerated stratum; Clopper–Pearson with `tail` on each side for a sample. */
function failingShare(stratum: Stratum, tail: number): RateBounds {
  if (gradeOf(stratum) === 'proved') return none;
  const { frameErrors: x, frames } = stratum;
  const estimate = x / frames;
  if (gradeOf(stratum) === 'computed') return { estimate, lower: estimate, upper: estimate };
  return { estimate, lower: lowerLimit(x, frames, tail), upper: upperLimit(x, frames, tail) };
}

/** Share of wrong bits: the failing share times the mean share of wrong bits in a failing frame, which lies within 1/n
 *  and 1. Null when bit errors were not given. */
function wrongShare(stratum: Stratum, n: number, allowance: number): RateBounds | null {
  const { frames, frameErrors: x, bitErrors, bitErrorsSquared } = stratum;
  if (gradeOf(stratum) === 'proved') return none;
  if (bitErrors === undefined || bitErrorsSquared === undefined) return null;
  const estimate = bitErrors / frames / n;
  if (gradeOf(stratum) === 'computed') return { estimate, lower: estimate, upper: estimate };
  const failing = failingShare(stratum, allowance / 4);
  const mean = boundedMeanInterval(x, bitErrors / n, bitErrorsSquared / n ** 2, allowance / 4);
  return { estimate, lower: (failing.lower * Math.max(1, n * mean.lower)) / n, upper: failing.upper * mean.upper };
}

function refuse(stratum: Stratum, n: number, again: boolean): void {
  const { weight, frames, frameErrors, grade } = stratum;
  if (!Number.isInteger(weight) || weight < 0 || weight > n || again)
    throw new ParamError('strata.weight', weight, `weights from 0 to ${n}, each once`);
  if (grade === 'proved') {
    if (frameErrors > 0) throw new ParamError('strata.frameErrors', frameErrors, '0 where none can fail');
    return;
  }
  if (!(Number.isSafeInteger(frames) && frames >= 1)) throw new ParamError('strata.frames', frames, 'at least 1 frame');
  if (!(Number.isInteger(frameErrors) && frameErrors >= 0 && frameErrors <= frames))
    throw new ParamError('strata.frameErrors', frameErrors, `a whole number from 0 to ${frames}`);
}
