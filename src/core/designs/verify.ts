import { LimitError, ParamError } from '../errors.ts';
import { type BlockDesign, blockOf } from './block-design.ts';
import { mapsBlocksOntoThemselves, orbitRepresentatives } from './block-symmetry.ts';
import { isSelfComplementary } from './self-complementary.ts';
import { binomial, type SubsetRanking, subsetOfRank, subsetRanking } from './subset-rank.ts';

/** Counters one verification may hold: 2^28, that is 256 MiB at one byte a t-subset. */
export const MAX_COUNTED_SUBSETS = 2 ** 28;

/** Increments a direct count may take before known symmetry is used in its place: a few seconds of work. */
const MAX_DIRECT_INCREMENTS = 4e8;

/** What was checked of a claim "every t-subset of the points lies in exactly lambda blocks", and how. */
export interface DesignCertificate {
  holds: boolean;
  t: number;
  lambda: number;
  v: number;
  /** Common block size; the largest one when sizes differ (and then the claim does not hold). */
  k: number;
  b: number;
  /** Blocks on a point, b·k/v; a mean when the claim does not hold. */
  r: number;
  /** How it was checked, in a sentence. */
  method: string;
  /** Subsets whose blocks were counted one by one (not through symmetry). */
  subsetsCounted: number;
  /** Why the claim fails, when it does. */
  reason?: string;
  /** A subset covered a wrong number of times, and that number. */
  counterexample?: { points: number[]; covered: number };
}

/** Checks from the blocks alone that every t-subset (t ≤ 5) lies in exactly lambda blocks of one size.
 *  Counts every t-subset where that fits. A larger design with known symmetry has its generators verified first
 *  (each must map the blocks onto themselves); then only subsets through one point of every orbit are counted, which
 *  reaches every t-subset because each contains a point and some group element takes that point to its representative.
 *  Failing that, blocks that are half the points and closed under complement need their (t − 1)-subsets counted only,
 *  when t is odd (W. O. Alltop 1975, "Extending t-designs", J. Combin. Theory A 18).
 *  @throws ParamError for t outside 1..5 or lambda not a positive integer.
 *  @throws LimitError when more counters are needed than MAX_COUNTED_SUBSETS and no symmetry helps. */
export function verifyDesign(design: BlockDesign, claim: { t: number; lambda: number }): DesignCertificate {
  const { t, lambda } = claim;
  if (!Number.isInteger(t) || t < 1 || t > 5) throw new ParamError('t', t, 'an integer from 1 to 5');
  if (!Number.isInteger(lambda) || lambda < 1) throw new ParamError('lambda', lambda, 'a positive integer');
  const { v, b } = design;
  const k = largestBlock(design);
  const base = { t, lambda, v, k, b, r: (b * k) / v };
  const malformed = malformation(design, k, t);
  if (malformed) return { ...base, holds: false, method: 'block by block', subsetsCounted: 0, reason: malformed };
  const fits = binomial(v, t) <= MAX_COUNTED_SUBSETS;
  if (fits && b * binomial(k, t) <= MAX_DIRECT_INCREMENTS) return { ...base, ...countAll(design, t, lambda) };
  const symmetric = t >= 2 ? countThroughRepresentatives(design, t, lambda) : undefined;
  if (symmetric) return { ...base, ...symmetric };
  const complementary = countThroughComplements(design, k, t, lambda);
  if (complementary) return { ...base, ...complementary };
  if (!fits) throw new LimitError(`counting every ${t}-subset`, binomial(v, t), MAX_COUNTED_SUBSETS, 'counters');
  return { ...base, ...countAll(design, t, lambda) };
}

type Verdict = Pick<DesignCertificate, 'holds' | 'method' | 'subsetsCounted' | 'reason' | 'counterexample'>;

function largestBlock({ b, blockStart }: BlockDesign): number {
  let k = 0;
  for (let i = 0; i < b; i++) k = Math.max(k, blockStart[i + 1]! - blockStart[i]!);
  return k;
}

/** Why these are not b blocks of k distinct points, or undefined when they are. */
function malformation(design: BlockDesign, k: number, t: number): string | undefined {
  const { v, b, blockStart, blockPoints } = design;
  if (b === 0) return 'there are no blocks';
  if (blockStart[0] !== 0 || blockStart[b] !== blockPoints.length) return 'the offsets do not cover the list of points';
  for (let i = 0; i < b; i++) {
    const from = blockStart[i]!;
    const to = blockStart[i + 1]!;
    if (to - from !== k) return `block ${i} has ${to - from} points where others have ${k}`;
    if (blockPoints[to - 1]! >= v) return `block ${i} has a point that is not below ${v}`;
    for (let e = from + 1; e < to; e++) {
      if (blockPoints[e]! <= blockPoints[e - 1]!)
        return `block ${i} is not a list of distinct points in ascending order`;
    }
  }
  return k < t ? `blocks have ${k} points, fewer than t = ${t}` : undefined;
}

function countAll(design: BlockDesign, t: number, lambda: number): Verdict {
  const failed = firstWrongSubset(design, subsetRanking(design.v, t), lambda);
  const count = binomial(design.v, t);
  return verdict(design, lambda, failed, count, `all ${count} ${t}-subsets counted`);
}

/** Undefined when there is no usable symmetry, or when it does not bring the counters under the limit. */
function countThroughRepresentatives(design: BlockDesign, t: number, lambda: number): Verdict | undefined {
  const generators = (design.symmetry ?? []).map((s) => s.pointPerm);
  if (generators.length === 0 || binomial(design.v - 1, t - 1) > MAX_COUNTED_SUBSETS) return undefined;
  const representatives = orbitRepresentatives(design.v, generators);
  if (representatives.length * 2 > design.v) return undefined;
  if (!generators.every((perm) => mapsBlocksOntoThemselves(design, perm))) return undefined;
  const ranking = subsetRanking(design.v - 1, t - 1);
  let subsetsCounted = 0;
  let failed: number[] | undefined;
  for (const p of representatives) {
    const wrong = firstWrongSubset(derivedBlocks(design, p), ranking, lambda);
    subsetsCounted += ranking.count;
    failed = wrong && [p, ...wrong.map((x) => (x >= p ? x + 1 : x))].sort((x, y) => x - y);
    if (failed) break;
  }
  const method =
    `${generators.length} symmetry generator(s) verified to map the blocks onto themselves; then every ${t}-subset ` +
    `through one point of each of ${representatives.length} orbit(s) counted`;
  return verdict(design, lambda, failed, subsetsCounted, method);
}

/** With every complement of a block a block, as many blocks miss a set of t points as contain it; by inclusion and
 *  exclusion the former, for odd t, is a sum over smaller subsets less the latter: so each is half of that sum. */
function countThroughComplements(design: BlockDesign, k: number, t: number, lambda: number): Verdict | undefined {
  const { v } = design;
  const lower = (lambda * (v - t + 1)) / (k - t + 1);
  if (t % 2 === 0 || t < 3 || 2 * k !== v || !Number.isInteger(lower) || !isSelfComplementary(design)) return undefined;
  const { method, ...counted } = countAll(design, t - 1, lower);
  return {
    ...counted,
    method: `the complement of every block found among the blocks; then ${method}, which for odd t = ${t} suffices (Alltop 1975)`,
  };
}

function verdict(
  design: BlockDesign,
  lambda: number,
  points: number[] | undefined,
  subsetsCounted: number,
  method: string,
): Verdict {
  if (!points) return { holds: true, method, subsetsCounted };
  const covered = blocksContaining(design, points);
  const reason = `points ${points.join(', ')} lie together in ${covered} block(s), not ${lambda}`;
  return { holds: false, method, subsetsCounted, reason, counterexample: { points, covered } };
}

/** The blocks on p without p, the points above p moved down by one. */
function derivedBlocks(design: BlockDesign, p: number): BlockDesign {
  const through: number[] = [];
  for (let i = 0; i < design.b; i++) if (blockOf(design, i).includes(p)) through.push(i);
  const size = design.b > 0 ? design.blockStart[1]! - 1 : 0;
  const blockPoints = new Uint32Array(through.length * size);
  let e = 0;
  for (const i of through) for (const x of blockOf(design, i)) if (x !== p) blockPoints[e++] = x > p ? x - 1 : x;
  const blockStart = Uint32Array.from({ length: through.length + 1 }, (_, i) => i * size);
  return { v: design.v - 1, b: through.length, blockStart, blockPoints };
}

/** Number of blocks that contain all the points. */
export function blocksContaining(design: BlockDesign, points: readonly number[]): number {
  let covered = 0;
  for (let i = 0; i < design.b; i++) {
    const block = blockOf(design, i);
    if (points.every((p) => block.includes(p))) covered++;
  }
  return covered;
}

/** Counts in place; a counter that passes lambda ends the count at once, so a byte never overflows. */
function firstWrongSubset(design: BlockDesign, ranking: SubsetRanking, lambda: number): number[] | undefined {
  const counters = makeCounters(ranking.count, lambda);
  const over = ranking.t === 2 ? countPairs(design, counters, lambda) : countSubsets(design, ranking, counters, lambda);
  if (over >= 0) return subsetOfRank(ranking, over);
  const short = counters.findIndex((count: number) => count !== lambda);
  return short < 0 ? undefined : subsetOfRank(ranking, short);
}

type Counters = Uint8Array | Uint32Array;

function makeCounters(count: number, lambda: number): Counters {
  const bytes = lambda < 255 ? 1 : 4;
  if (count * bytes > MAX_COUNTED_SUBSETS) {
    throw new LimitError('counting subsets', count * bytes, MAX_COUNTED_SUBSETS, 'bytes of counters');
  }
  return bytes === 1 ? new Uint8Array(count) : new Uint32Array(count);
}

/** Number of the first pair covered more than lambda times, or −1. */
function countPairs(design: BlockDesign, counters: Counters, lambda: number): number {
  const { b, blockStart, blockPoints } = design;
  for (let i = 0; i < b; i++) {
    const from = blockStart[i]!;
    const to = blockStart[i + 1]!;
    for (let e = from + 1; e < to; e++) {
      const q = blockPoints[e]!;
      const row = (q * (q - 1)) / 2;
      for (let f = from; f < e; f++) if (++counters[row + blockPoints[f]!]! > lambda) return row + blockPoints[f]!;
    }
  }
  return -1;
}

/** Number of the first subset covered more than lambda times, or −1; any size of subset, by an odometer of places. */
function countSubsets(design: BlockDesign, ranking: SubsetRanking, counters: Counters, lambda: number): number {
  const { t, terms } = ranking;
  const place = new Int32Array(t);
  /** partial[i] = rank contributed by the places i and above. */
  const partial = new Float64Array(t + 1);
  for (let i = 0; i < design.b; i++) {
    const block = blockOf(design, i);
    const lowest = terms[0]!;
    for (let level = 0; level < t; level++) place[level] = level;
    let level = t - 1;
    while (level < t) {
      for (; level > 0; level--) partial[level] = partial[level + 1]! + terms[level]![block[place[level]!]!]!;
      const rest = partial[1]!;
      const end = t > 1 ? place[1]! : block.length;
      for (let e = 0; e < end; e++) {
        const rank = rest + lowest[block[e]!]!;
        if (++counters[rank]! > lambda) return rank;
      }
      level = advance(place, block.length);
    }
  }
  return -1;
}

/** Moves the places above the lowest to the next choice in colexicographic order; returns the highest place that
 *  moved, or the number of places when all choices are done. Place i always stays at least i. */
function advance(place: Int32Array, size: number): number {
  const t = place.length;
  for (let level = 1; level < t; level++) {
    const ceiling = level + 1 < t ? place[level + 1]! : size;
    if (place[level]! + 1 < ceiling) {
      place[level]!++;
      for (let lower = 1; lower < level; lower++) place[lower] = lower;
      return level;
    }
  }
  return t;
}

/** Claim-free twin for small subsets: number of blocks on a subset, by its rank. */
export function coverageOf(design: BlockDesign, t: number): { ranking: SubsetRanking; counts: Uint32Array } {
  const ranking = subsetRanking(design.v, t);
  if (ranking.count * 4 > MAX_COUNTED_SUBSETS) {
    throw new LimitError('counting subsets', ranking.count * 4, MAX_COUNTED_SUBSETS, 'bytes of counters');
  }
  const counts = new Uint32Array(ranking.count);
  if (t === 2) countPairs(design, counts, 2 ** 32);
  else countSubsets(design, ranking, counts, 2 ** 32);
  return { ranking, counts };
}
