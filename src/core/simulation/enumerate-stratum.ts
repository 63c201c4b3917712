import { createDecoder, decodesErasures } from '../decoders/create-decoder.ts';
import { erased } from '../decoders/decoder.ts';
import type { Symmetry } from '../designs/block-design.ts';
import { LimitError, ParamError } from '../errors.ts';
import { followsSymmetry, mapsRowsOntoThemselves, symmetryOf } from './code-symmetry.ts';
import { orbitPatterns } from './orbit-patterns.ts';
import { type PermutationGroup, permutationGroup, trivialGroup } from './permutation-group.ts';
import type { RunSpec } from './run-spec.ts';
import { drive, type ShardOptions } from './shard.ts';
import { stratumSpec } from './strata.ts';
import type { Stratum } from './stratified-rate.ts';
import type { Tally } from './tally.ts';
import { keepTally } from './tally-frame.ts';
import { validateSpec } from './validate-spec.ts';

export interface EnumerationOptions extends ShardOptions {
  /** Column permutations that map the set of rows onto itself, such as `columnSymmetry` of a code; found in the matrix
   *  when not given, checked when given. */
  symmetry?: readonly Pick<Symmetry, 'pointPerm'>[];
  /** Branches to do, of the `branches` in all: `from` up to, without, `to`. All of them when not given. */
  from?: number;
  to?: number;
  /** Most patterns, up to symmetry, that may be decoded for the whole weight. */
  limitPatterns?: number;
}

export interface Enumeration extends Tally {
  /** Patterns counted, each orbit in full. */
  patterns: bigint;
  /** Patterns decoded: one an orbit. */
  representatives: number;
  symmetryOrder: number;
  branches: number;
  /** Whether all branches were done, so that the counts are those of the whole stratum, grade "computed". */
  complete: boolean;
}

const usualLimit = 20_000_000;

/** Decodes every pattern of a weight, one an orbit of the known symmetry, each counted as often as its orbit is large.
 *  Parts done by ranges of branches add up to the whole, so that a long enumeration can be stopped and taken up again.
 *  With sum-product the orbit's patterns end alike up to rounding; with peeling the iterations, not the words, are those
 *  of the representative.
 *  @throws LimitError when more patterns than the limit would have to be decoded; ParamError as `runStratum` does, and
 *  on a permutation that is no symmetry. */
export async function enumerateStratum(
  spec: RunSpec,
  weight: number,
  options: EnumerationOptions = {},
): Promise<Enumeration> {
  const stratum = stratumSpec(spec, weight);
  validateSpec(stratum);
  const group = groupFor(stratum, options.symmetry);
  const least = leastRepresentatives(spec.H.cols, weight, group.order);
  const limit = options.limitPatterns ?? usualLimit;
  if (least > limit) throw new LimitError(`stratum of weight ${weight}`, least, limit, 'patterns up to symmetry');
  return drive(enumerating(stratum, weight, group, options), options);
}

/** C(n, w) over the group's order: no group has fewer orbits. */
function leastRepresentatives(n: number, weight: number, order: number): number {
  let count = 1 / order;
  for (let i = 0; i < Math.min(weight, n - weight); i++) count *= (n - i) / (i + 1);
  return Math.floor(count);
}

function groupFor({ H, decoder }: RunSpec, symmetry: EnumerationOptions['symmetry']): PermutationGroup {
  const given = symmetry?.map(({ pointPerm }) => pointPerm);
  for (const permutation of given ?? []) {
    if (permutation.length !== H.cols || !mapsRowsOntoThemselves(H, permutation))
      throw new ParamError('symmetry', permutation, 'permutations of the columns that keep the set of rows');
  }
  return followsSymmetry(decoder) ? permutationGroup(H.cols, given ?? symmetryOf(H)) : trivialGroup(H.cols);
}

/** Edges walked between two pauses. */
const edgesPerPause = 400_000;

async function* enumerating(
  spec: RunSpec,
  weight: number,
  group: PermutationGroup,
  { from = 0, to = Number.POSITIVE_INFINITY }: EnumerationOptions,
): AsyncGenerator<number, Enumeration> {
  const { H, decoder } = spec;
  const decode = createDecoder(H, decoder, spec.channel).decode;
  const orbits = orbitPatterns(group, weight);
  const mark = decodesErasures(decoder) ? erased : 1;
  const sent = new Uint8Array(H.cols);
  const received = new Uint8Array(H.cols);
  const keeper = keepTally(H.cols);
  const framesPerPause = Math.max(1, Math.floor(edgesPerPause / (10 * H.colIndex.length)));
  let representatives = 0;
  for (const { positions, orbitSize } of orbits.walk(from, to)) {
    received.fill(0);
    for (const j of positions) received[j] = mark;
    keeper.add(sent, decode(received), orbitSize);
    representatives += 1;
    if (representatives % framesPerPause === 0) yield representatives;
  }
  const tally = keeper.tally();
  refuseInexact(tally);
  return {
    ...tally,
    patterns: BigInt(tally.frames),
    representatives,
    symmetryOrder: group.order,
    branches: orbits.branches,
    complete: from <= 0 && to >= orbits.branches,
  };
}

function refuseInexact(tally: Tally): void {
  const largest = Math.max(tally.bits, tally.bitErrorsSquared);
  if (largest > Number.MAX_SAFE_INTEGER)
    throw new LimitError('counts of an enumeration', largest, Number.MAX_SAFE_INTEGER, 'in one tally');
}

/** What an enumeration says of its weight, for `stratifiedRate`.
 *  @throws ParamError on one that was not completed. */
export function computedStratum(weight: number, enumeration: Enumeration): Stratum {
  if (!enumeration.complete)
    throw new ParamError('enumeration', `${enumeration.patterns} patterns`, 'all patterns of the weight');
  const { frames, frameErrors, bitErrors, bitErrorsSquared } = enumeration;
  return { weight, frames, frameErrors, bitErrors, bitErrorsSquared, grade: 'computed' };
}
