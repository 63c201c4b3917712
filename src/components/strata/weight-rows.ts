import { patternCount } from '@/client/strata/enumeration.ts';
import type { EnumerationProgress } from '@/client/strata/enumeration-store.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { fractionsByWeight, type RateBounds } from '@/core/simulation/stratified-rate.ts';

/** A weight, or neighbours of which the same is known. */
export interface WeightRow {
  from: number;
  to: number;
  known: 'proved' | 'computed' | 'sampled' | 'untried';
  frames: number;
  frameErrors: number;
  /** The failing share with the limits that the combination uses. */
  share: RateBounds | null;
  /** C(n, w), of a single weight. */
  patterns: number;
  enumeration: EnumerationProgress | null;
}

/** One row a weight up to the heaviest tried; proved ones share a row, as do untried neighbours too many to list. */
export function weightRows({ group, strata, enumerations }: StrataEvidence): WeightRow[] {
  const { n, level } = group;
  const fractions = fractionsByWeight(strata, n, level);
  const byWeight = new Map(strata.map((stratum) => [stratum.weight, stratum]));
  const heaviest = Math.max(0, ...byWeight.keys());
  const rows: WeightRow[] = [];
  for (let weight = 0; weight <= heaviest; weight++) {
    const stratum = byWeight.get(weight);
    const known = stratum ? (stratum.grade ?? 'sampled') : weight === 0 ? 'proved' : 'untried';
    const last = rows.at(-1);
    const enumeration = enumerations.find((entry) => entry.weight === weight) ?? null;
    if (
      last &&
      last.known === known &&
      (known === 'proved' || (known === 'untried' && !enumeration && !last.enumeration && last.patterns > LISTED_UP_TO))
    ) {
      last.to = weight;
      continue;
    }
    rows.push({
      from: weight,
      to: weight,
      known,
      frames: stratum?.frames ?? 0,
      frameErrors: stratum?.frameErrors ?? 0,
      share: known === 'untried' ? null : fractions[weight]!.frames,
      patterns: patternCount(n, weight),
      enumeration,
    });
  }
  return rows;
}

/** Weights of more patterns are enumerated by nobody; untried ones are not listed one by one. */
export const LISTED_UP_TO = 1e12;
