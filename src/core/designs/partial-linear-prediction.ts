import type { Citation } from '../errors.ts';
import type { Enclosure, Grade, Graded } from '../evidence.ts';
import type { CodePrediction } from './family.ts';

/** Counts of a geometry with constant block size and constant number of blocks on a point; where the girth is above 4,
 *  two points lie on at most one block. */
export interface PartialLinearCounts {
  v: number;
  b: number;
  k: number;
  r: number;
}

export interface PartialLinearFacts {
  /** Shortest cycle of the incidence graph, a proved value. */
  girth: number;
  rank?: Graded<Enclosure>;
  /** Where the girth is 4: the most blocks on two points. */
  commonBlocks?: number;
  /** Distance by orientation, where more is known than the tree bound. */
  distance?: Partial<Record<CodePrediction['checks'], Graded<Enclosure>>>;
  structure?: Partial<Record<CodePrediction['checks'], CodePrediction['structure']>>;
}

/** A value known exactly. */
export function exactly(value: number, grade: Grade, method: string, source?: Citation): Graded<Enclosure> {
  return { value: { lower: value, upper: value }, grade, method, source };
}

/** A value enclosed from both sides. */
export function between(lower: number, upper: number, method: string, source?: Citation): Graded<Enclosure> {
  return { value: { lower, upper }, grade: lower === upper ? 'proved' : 'bounded', method, source };
}

/** The codes of a partial linear space, checks = blocks (length v) first, then checks = points (length b). */
export function predictPartialLinearCodes(counts: PartialLinearCounts, facts: PartialLinearFacts): CodePrediction[] {
  return (['blocks', 'points'] as const).map((checks) => predictOrientation(checks, counts, facts));
}

function predictOrientation(
  checks: CodePrediction['checks'],
  { v, b, k, r }: PartialLinearCounts,
  facts: PartialLinearFacts,
): CodePrediction {
  const [n, columnWeight, rowWeight] = checks === 'blocks' ? [v, r, k] : [b, k, r];
  const rank = facts.rank ?? between(rankLowerBound(v, b, k, r, facts.girth), Math.min(v, b), 'sphere packing; size');
  const dimension: Graded<Enclosure> = {
    value: { lower: n - rank.value.upper, upper: n - rank.value.lower },
    grade: rank.grade,
    method: `n − rank; rank: ${rank.method}`,
    source: rank.source,
  };
  return {
    checks,
    n,
    rank,
    k: dimension,
    girth: exactly(facts.girth, 'proved', 'the axioms of the geometry'),
    distance: facts.distance?.[checks] ?? distanceEnclosure(columnWeight, facts.girth, dimension.value, n),
    rowWeight,
    columnWeight,
    oneStepRadius: oneStepRadius(checks, columnWeight, facts),
    structure: facts.structure?.[checks] ?? 'none',
  };
}

/** Errors corrected by one vote among the checks on a bit. With orthogonal checks half of them (Massey 1963). When another
 *  bit shares at most λ checks with it, w errors elsewhere spoil at most λw votes, so half of the checks over λ. */
function oneStepRadius(checks: CodePrediction['checks'], votes: number, facts: PartialLinearFacts): Graded<number> {
  if (facts.girth >= 6) {
    const method = 'as many checks orthogonal on each bit as its column weight (Massey 1963)';
    return { value: Math.floor(votes / 2), grade: 'proved', method };
  }
  const shared = checks === 'blocks' ? facts.commonBlocks : undefined;
  const method = shared ? `no two bits share more than ${shared} checks` : 'no bound on shared checks was used';
  return { value: shared ? Math.floor(votes / (2 * shared)) : 0, grade: 'proved', method };
}

function distanceEnclosure(columnWeight: number, girth: number, k: Enclosure, n: number): Graded<Enclosure> {
  if (k.upper === 0) return exactly(0, 'proved', 'the code holds only the zero word');
  // Where the dimension may be zero, so may the distance, by the convention for the zero code.
  const least = Math.min(n, treeBound(columnWeight, girth));
  const lower = k.lower === 0 ? 0 : least;
  return between(
    lower,
    Math.max(least, n - Math.max(k.lower, 1) + 1),
    'tree bound (Tanner 1981) below; Singleton above',
  );
}

/** Least weight of a word when every bit is in `columnWeight` checks and the Tanner graph has the girth: the tree grown
 *  from a bit of the word must meet another of its bits under every check.
 *  Source: Tanner, IEEE Trans. Inf. Theory 27 (1981) 533–547, Theorem 2. */
export function treeBound(columnWeight: number, girth: number): number {
  const j = columnWeight;
  let bound = 1;
  let layer = j;
  const depth = Math.floor((girth / 2 - 1) / 2);
  for (let i = 0; i < depth; i++) {
    bound += layer;
    layer *= j - 1;
  }
  return (girth / 2) % 2 === 0 ? bound + layer / j : bound;
}

/** The larger of both orientations' sphere-packing bounds: redundancy holds the logarithm of the patterns of weight
 *  up to half the tree bound. */
export function rankLowerBound(v: number, b: number, k: number, r: number, girth: number): number {
  return Math.max(spherePacking(v, treeBound(r, girth)), spherePacking(b, treeBound(k, girth)));
}

function spherePacking(n: number, distance: number): number {
  let logTerm = 0;
  let sum = 1; // relative to the largest term so far, kept as sum · 2^logTerm
  for (let w = 1; w <= Math.min((distance - 1) / 2, n); w++) {
    const next = logTerm + Math.log2((n - w + 1) / w);
    sum = sum * 2 ** (logTerm - next) + 1;
    logTerm = next;
  }
  return Math.ceil(logTerm + Math.log2(sum) - 1e-9);
}
