import type { DesignSpec, Symmetry } from '../designs/block-design.ts';
import type { Enclosure, Graded } from '../evidence.ts';
import { type Circulant, circulantOf, cyclicGenerators } from '../gf2/cyclic.ts';
import { quasiCyclicForm } from '../gf2/quasi-cyclic.ts';
import { findRank } from '../gf2/rank.ts';
import { type CycleCounts, countCycles } from './analysis/cycles.ts';
import { type DistanceEffort, distanceOf } from './analysis/distance/distance.ts';
import { weightFourWords } from './analysis/distance/weight-four.ts';
import { girth as girthOf } from './analysis/girth.ts';
import { type MajoritySteps, multiStepMajority, oneStepRadius } from './analysis/majority-logic.ts';
import { type TannerOrbits, tannerOrbits } from './analysis/tanner-orbits.ts';
import { columnWeightProfile, rowWeightProfile, type WeightProfile } from './analysis/weights.ts';
import type { SparseMatrix } from './sparse-matrix.ts';

/** What analysis needs of a code: the matrix, and its origin where that lets theorems speak. */
export interface AnalysableCode {
  H: SparseMatrix;
  checks?: 'blocks' | 'points';
  design?: DesignSpec;
  transforms?: readonly unknown[];
  columnSymmetry?: readonly Symmetry[];
}

export interface LdpcAnalysis {
  n: number;
  k: number;
  rank: number;
  /** k / n. */
  rate: number;
  rowWeights: WeightProfile;
  columnWeights: WeightProfile;
  /** Infinity for a Tanner graph without cycles. */
  girth: number;
  /** Numbers of cycles by length, where they could be counted; bigint past 2^53. */
  cycles?: { 4?: number | bigint; 6?: number | bigint; 8?: number | bigint };
  /** Cycles through each column by length, in the order of the columns. */
  cyclesPerColumn?: Map<number, Float64Array>;
  /** Least weight of a codeword other than zero; 0 to 0 when there is none. */
  distance: Graded<Enclosure>;
  /** Errors that one vote among each bit's checks always corrects. */
  oneStepRadius: Graded<number>;
  /** Majority logic in several steps, for checks on the flats of a geometry. */
  majority?: Graded<MajoritySteps>;
  /** Number of words of weight 4, for codes of triples few enough to be gone through at once. */
  weightFourWords?: Graded<number>;
  /** The rows are closed under the cyclic shift of the columns. */
  cyclic: boolean;
  circulant?: Circulant;
  /** The rows are closed under moving every block of `size` columns by one place; not given for cyclic matrices. */
  quasiCyclic?: { size: number; blocks: number };
  evidence: {
    rank: Graded<number>;
    k: Graded<number>;
    girth: Graded<number>;
    cycles?: Graded<Record<string, number | bigint>>;
    cyclic: Graded<boolean>;
  };
}

/** Rank, weights, girth, cycles and distance of the code {c : H·c = 0}. Cycles are counted unless `cycles` is false;
 *  `distance` says how hard to look, by name or by budget; `onProgress` is told the share of that budget spent.
 *  @throws LimitError when the matrix is too large to be ranked. */
export function analyseLdpc(
  code: AnalysableCode,
  options: { cycles?: boolean; distance?: DistanceEffort; onProgress?(share: number): void } = {},
): LdpcAnalysis {
  const { H } = code;
  const { onProgress } = options;
  const circulant = circulantOf(H) ?? undefined;
  const cyclic = cyclicGenerators(H) !== null;
  const form = cyclic ? null : quasiCyclicForm(H);
  const { rank, method: rankMethod } = findRank(H, form);
  const k = H.cols - rank;
  const orbits = tannerOrbits(H, code.columnSymmetry);
  const girth = girthOf(H, orbits);
  const columnWeights = columnWeightProfile(H);
  const leastColumnWeight = columnWeights[0]?.[0] ?? 0;
  const fours = (H.rows <= MOST_POINTS_AT_ONCE && weightFourWords(H, girth)) || undefined;
  const counted = options.cycles === false ? undefined : countCycles(H, girth, LONGEST_COUNTED, orbits);
  const cycles: Record<string, number | bigint> = Object.fromEntries(counted?.total ?? []);
  return {
    n: H.cols,
    k,
    rank,
    rate: H.cols === 0 ? 0 : k / H.cols,
    rowWeights: rowWeightProfile(H),
    columnWeights,
    girth,
    ...(counted && { cycles, cyclesPerColumn: counted.perColumn }),
    distance: distanceOf(
      code,
      { k, girth, cyclic, leastColumnWeight, orbits, weightFourWords: fours, onProgress },
      options.distance,
    ),
    oneStepRadius: oneStepRadius(H, girth, orbits),
    majority: multiStepMajority(code) ?? undefined,
    weightFourWords: fours,
    cyclic,
    circulant,
    quasiCyclic: form ? { size: form.size, blocks: form.blocks } : undefined,
    evidence: {
      rank: { value: rank, grade: 'computed', method: rankMethod },
      k: { value: k, grade: 'computed', method: 'n − rank' },
      girth: { value: girth, grade: 'computed', method: `breadth-first search from ${rootsOf(orbits)}` },
      ...(counted && { cycles: { value: cycles, grade: 'computed', method: cyclesMethod(counted, orbits) } }),
      cyclic: { value: cyclic, grade: 'computed', method: 'every row shifted is a row' },
    },
  };
}

/** Triples on more points are searched for Pasch configurations only when asked. */
const MOST_POINTS_AT_ONCE = 300;

/** Cycles up to this length are counted, where the method reaches it. */
const LONGEST_COUNTED = 8;

function rootsOf({ symmetry, columns }: TannerOrbits): string {
  if (symmetry === 'none') return 'every column';
  return `${columns.representatives.length} of ${columns.orbitOf.length} columns, one an orbit (${symmetry})`;
}

function cyclesMethod({ stoppedBy }: CycleCounts, orbits: TannerOrbits): string {
  const stopped = stoppedBy ? `; longer ones not counted: ${stoppedBy}` : '';
  return `closed walks from ${rootsOf(orbits)}${stopped}`;
}
