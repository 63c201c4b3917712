import type { Enclosure, Graded } from '../evidence.ts';
import type { CodePrediction } from './family.ts';
import { exactly } from './partial-linear-prediction.ts';

/** The counts of a 2-(v,k,λ) design from which its codes are predicted. */
export interface TwoDesignCounts {
  v: number;
  b: number;
  k: number;
  r: number;
  /** Blocks on two points. */
  lambda: number;
}

/** Rank over GF(2) of the incidence matrix of a 2-design.
 *  When r − λ is odd, N·Nᵀ = (r−λ)I + λJ is nonsingular up to the all-one vector, so the rank is v − 1 when blocks
 *  have even size (the rows of points then sum to zero) and v otherwise; see Hamada, Hiroshima Math. J. 3 (1973).
 *  When r − λ is even only an enclosure is known in general: for λ = 1 the r blocks on a point are independent. */
export function rankOfTwoDesign({ v, b, k, r, lambda }: TwoDesignCounts): Graded<Enclosure> {
  const top = Math.min(b, k % 2 === 0 ? v - 1 : v);
  if ((r - lambda) % 2 !== 0) return exactly(top, 'proved', 'r − λ is odd (Hamada 1973)');
  const lower = lambda === 1 ? r : Math.ceil(Math.log2(b));
  return { value: { lower, upper: top }, grade: 'bounded', method: 'independent blocks on a point; number of points' };
}

export interface CodeFacts {
  rank?: Graded<Enclosure>;
  /** The blocks are closed under x → x + 1 modulo v and listed orbit by orbit. */
  cyclic?: boolean;
  structure?: CodePrediction['structure'];
  /** What is known of the distance in one orientation, beyond the bound from the girth. */
  distance?: Partial<Record<CodePrediction['checks'], Graded<Enclosure>>>;
  orientations?: readonly CodePrediction['checks'][];
}

/** Both codes of a design: checks = points has length b, checks = blocks has length v. */
export function predictTwoDesignCodes(counts: TwoDesignCounts, facts: CodeFacts = {}): CodePrediction[] {
  const rank = facts.rank ?? rankOfTwoDesign(counts);
  const { v, b, k, r, lambda } = counts;
  return (facts.orientations ?? (['points', 'blocks'] as const)).map((checks) => {
    const [n, columnWeight, rowWeight] = checks === 'points' ? [b, k, r] : [v, r, k];
    const dimension = dimensionFrom(n, rank);
    // Two columns of the points orientation meet in the points of two blocks, of the other in the λ blocks on a pair.
    const orthogonal = lambda === 1;
    return {
      checks,
      n,
      rank,
      k: dimension,
      girth: girthOf(counts),
      distance: facts.distance?.[checks] ?? distanceFromGirth(columnWeight, orthogonal, n, dimension.value),
      rowWeight,
      columnWeight,
      oneStepRadius: {
        value: orthogonal ? Math.floor(columnWeight / 2) : 0,
        grade: 'proved',
        method: orthogonal
          ? 'as many checks orthogonal on each bit as its column weight (Massey 1963)'
          : 'checks are not orthogonal, so one-step majority logic guarantees nothing by this argument',
      },
      structure: facts.cyclic ? structureOfCyclicDesign(checks, counts) : (facts.structure ?? 'none'),
    };
  });
}

/** Points as bits: cyclic. Blocks as bits: circulants of size v, unless a short orbit leaves b no multiple of v. */
function structureOfCyclicDesign(
  checks: CodePrediction['checks'],
  { v, b }: TwoDesignCounts,
): CodePrediction['structure'] {
  if (checks === 'blocks' || b === v) return 'cyclic';
  return b % v === 0 ? 'quasi-cyclic' : 'none';
}

function dimensionFrom(n: number, rank: Graded<Enclosure>): Graded<Enclosure> {
  const value = { lower: Math.max(0, n - rank.value.upper), upper: Math.max(0, n - rank.value.lower) };
  return { value, grade: rank.grade, method: `n − rank; rank: ${rank.method}`, source: rank.source };
}

/** Two points on two blocks close a 4-cycle. With λ = 1, three points not all on one block close a 6-cycle. */
function girthOf({ v, k, lambda }: TwoDesignCounts): Graded<Enclosure> {
  if (lambda > 1) return exactly(4, 'proved', 'two points lie on two common blocks');
  if (k === v) return { value: { lower: 0, upper: 0 }, grade: 'proved', method: 'a single block has no cycle' };
  return exactly(6, 'proved', 'two points lie on exactly one block; a triangle of three blocks closes a 6-cycle');
}

/** Column weight + 1 where checks are orthogonal (girth ≥ 6; Tanner 1981), else 2; Singleton above. */
function distanceFromGirth(
  columnWeight: number,
  orthogonal: boolean,
  n: number,
  dimension: Enclosure,
): Graded<Enclosure> {
  if (dimension.upper === 0) {
    return { value: { lower: 0, upper: 0 }, grade: 'proved', method: 'the code holds only the zero word' };
  }
  // Where the dimension may be zero, so may the distance, by the convention for the zero code.
  const least = Math.min(n, orthogonal ? columnWeight + 1 : 2);
  const lower = dimension.lower === 0 ? 0 : least;
  const upper = Math.max(least, n - Math.max(1, dimension.lower) + 1);
  return { value: { lower, upper }, grade: 'bounded', method: 'orthogonal checks below; Singleton above' };
}
