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
import { orbitsText, type TannerOrbits, tannerOrbits } from './analysis/tanner-orbits.ts';
import { columnWeightProfile, rowWeightProfile, type WeightProfile } from './analysis/weights.ts';
import { laps } from './laps.ts';
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

export interface AnalyseOptions {
  /** Cycles are counted unless this is false. */
  cycles?: boolean;
  /** How hard to look for the distance, by name or by budget. */
  distance?: DistanceEffort;
  /** Told the share of that budget spent. */
  onProgress?(share: number): void;
  /** Milliseconds; with it each value says the time spent on it. */
  clock?(): number;
}

/** Rank, weights, girth, cycles and distance of the code {c : H·c = 0}.
 *  @throws LimitError when the matrix is too large to be ranked. */
export function analyseLdpc(code: AnalysableCode, options: AnalyseOptions = {}): LdpcAnalysis {
  const { H } = code;
  const { onProgress } = options;
  const lap = laps(options.clock);
  const circulant = circulantOf(H) ?? undefined;
  const cyclic = cyclicGenerators(H) !== null;
  const form = cyclic ? null : quasiCyclicForm(H);
  const structureMs = lap();
  const { rank, method: rankMethod } = findRank(H, form);
  const k = H.cols - rank;
  const rankMs = lap();
  const orbits = tannerOrbits(H, code.columnSymmetry);
  const girth = girthOf(H, orbits);
  const girthMs = lap();
  const columnWeights = columnWeightProfile(H);
  const leastColumnWeight = columnWeights[0]?.[0] ?? 0;
  const fours = withTime((H.rows <= MOST_POINTS_AT_ONCE && weightFourWords(H, girth)) || undefined, lap());
  const counted = options.cycles === false ? undefined : countCycles(H, girth, LONGEST_COUNTED, orbits);
  const cycles: Record<string, number | bigint> = Object.fromEntries(counted?.total ?? []);
  const cyclesMs = lap();
  const facts = { k, girth, cyclic, leastColumnWeight, orbits, weightFourWords: fours, onProgress };
  const distance = withTime(distanceOf(code, facts, options.distance), lap());
  const oneStep = withTime(oneStepRadius(H, girth, orbits), lap());
  const majority = withTime(multiStepMajority(code) ?? undefined, lap());
  return {
    n: H.cols,
    k,
    rank,
    rate: H.cols === 0 ? 0 : k / H.cols,
    rowWeights: rowWeightProfile(H),
    columnWeights,
    girth,
    ...(counted && { cycles, cyclesPerColumn: counted.perColumn }),
    distance,
    oneStepRadius: oneStep,
    majority,
    weightFourWords: fours,
    cyclic,
    circulant,
    quasiCyclic: form ? { size: form.size, blocks: form.blocks } : undefined,
    evidence: {
      rank: computed(rank, rankMethod, rankMs),
      k: computed(k, 'n − rank'),
      girth: computed(girth, girthMethod(girth, orbits), girthMs),
      ...(counted && { cycles: computed(cycles, cyclesMethod(counted, orbits), cyclesMs) }),
      cyclic: computed(cyclic, 'every row shifted is a row', structureMs),
    },
  };
}

function computed<T>(value: T, method: string, elapsedMs?: number): Graded<T> {
  return { value, grade: 'computed', method, ...(elapsedMs !== undefined && { elapsedMs }) };
}

function withTime<T extends Graded<unknown> | undefined>(found: T, elapsedMs: number | undefined): T {
  return found && elapsedMs !== undefined ? { ...found, elapsedMs } : found;
}

/** Triples on more points are searched for Pasch configurations only when asked. */
const MOST_POINTS_AT_ONCE = 300;

/** Cycles up to this length are counted, where the method reaches it. */
const LONGEST_COUNTED = 8;

/** Said of 4-cycles wherever the girth is told: they are allowed, and cost iterative decoders most. */
function girthMethod(girth: number, orbits: TannerOrbits): string {
  const search = `breadth-first search from ${orbitsText(orbits)}`;
  return girth === 4 ? `${search}; there are 4-cycles: some two checks share two bits or more` : search;
}

function cyclesMethod({ stoppedBy }: CycleCounts, orbits: TannerOrbits): string {
  const stopped = stoppedBy ? `; longer ones not counted: ${stoppedBy}` : '';
  return `closed walks from ${orbitsText(orbits)}${stopped}`;
}
