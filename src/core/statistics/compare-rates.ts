import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import { binomialInterval, checkedLevel } from './binomial-interval.ts';

export interface Count {
  errors: number;
  frames: number;
}

export interface RateComparison {
  /** First rate over second; infinite or 0 where one has no errors, not a number where neither has. */
  ratio: Enclosure & { estimate: number };
  /** Probability, were the rates equal, of a split of the errors at least as unlikely as this one. */
  pValue: number;
  /** The lower rate at that level, or that the evidence does not tell. */
  verdict: 'first' | 'second' | 'undecided';
}

/** Whether two codes fail at different rates: Fisher's exact test given the sum of the errors (Statistical Methods for
 *  Research Workers, 1934), two-sided by adding all splits that are no likelier than the one seen. The limits on the
 *  ratio take the errors as Poisson (Clopper and Pearson on the share of the first; Przyborowski and Wilenski, Biometrika
 *  31, 1940), which widens them where rates are not small. The runs must be independent: of other seeds, where lengths
 *  are equal. */
export function compareRates(first: Count, second: Count, level: number): RateComparison {
  for (const [name, { errors, frames }] of Object.entries({ first, second })) {
    if (!Number.isSafeInteger(frames) || frames < 1) throw new ParamError(`${name}.frames`, frames, 'at least 1 frame');
    if (!Number.isSafeInteger(errors) || errors < 0 || errors > frames)
      throw new ParamError(`${name}.errors`, errors, `a whole number from 0 to ${frames}`);
  }
  const pValue = fisherPValue(first, second);
  const decided = pValue < 1 - checkedLevel(level);
  const lower = first.errors / first.frames < second.errors / second.frames ? 'first' : 'second';
  return { ratio: ratioInterval(first, second, level), pValue, verdict: decided ? lower : 'undecided' };
}

function ratioInterval(first: Count, second: Count, level: number): RateComparison['ratio'] {
  const errors = first.errors + second.errors;
  const scale = second.frames / first.frames;
  const odds = (share: number) => (share >= 1 ? Number.POSITIVE_INFINITY : (share / (1 - share)) * scale);
  if (errors === 0) return { estimate: Number.NaN, lower: 0, upper: Number.POSITIVE_INFINITY };
  const { lower, upper } = binomialInterval(first.errors, errors, level);
  return { estimate: odds(first.errors / errors), lower: odds(lower), upper: odds(upper) };
}

/** Terms this far below the largest are of no account; a smaller p-value is given as this. */
const negligible = 1e-25;

function fisherPValue(first: Count, second: Count): number {
  const errors = first.errors + second.errors;
  const least = Math.max(0, errors - second.frames);
  const most = Math.min(errors, first.frames);
  const up = (x: number) => ((first.frames - x) / (x + 1)) * ((errors - x) / (second.frames - errors + x + 1));
  const mode = likeliestSplit(first, second, least, most);
  // Weights relative to the likeliest split, outwards from it; ties within rounding count as no likelier.
  const weights = new Map([[mode, 1]]);
  for (let x = mode; x < most && weights.get(x)! > negligible; x++) weights.set(x + 1, weights.get(x)! * up(x));
  for (let x = mode; x > least && weights.get(x)! > negligible; x--) weights.set(x - 1, weights.get(x)! / up(x - 1));
  const seen = (weights.get(first.errors) ?? 0) * (1 + 1e-9);
  let total = 0;
  let tail = 0;
  for (const weight of weights.values()) {
    total += weight;
    if (weight <= seen) tail += weight;
  }
  return Math.min(1, Math.max(negligible, tail / total));
}

function likeliestSplit(first: Count, second: Count, least: number, most: number): number {
  const errors = first.errors + second.errors;
  const mode = Math.floor(((errors + 1) * (first.frames + 1)) / (first.frames + second.frames + 2));
  return Math.min(most, Math.max(least, mode));
}
