import type { Citation } from '../../../errors.ts';
import type { Enclosure, Graded } from '../../../evidence.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';
import { bitOrientedBound, parityOrientedBound } from '../distance/eigenvalue-bounds.ts';
import { searchLowWeight } from '../distance/low-weight-search.ts';
import { treeBound } from '../distance/tree-bound.ts';
import { girth } from '../girth.ts';
import { overlapSpectrum } from '../spectrum/second-eigenvalue.ts';
import { type TannerOrbits, tannerOrbits } from '../tanner-orbits.ts';
import { columnWeightProfile } from '../weights.ts';
import { CheckSearch } from './check-search.ts';
import { searchStoppingSets } from './stopping-search.ts';

const diProiettiTelatarRichardsonUrbanke2002: Citation = {
  authors: 'C. Di, D. Proietti, I. E. Telatar, T. J. Richardson, R. L. Urbanke',
  year: 2002,
  title: 'Finite-length analysis of low-density parity-check codes on the binary erasure channel',
  where: 'IEEE Trans. Inf. Theory 48, 1570–1579',
  part: 'Definition 1.1 and Lemma 1.1',
};

export interface StoppingSets {
  /** Size of the smallest non-empty set; 0 to 0 when there is none. */
  size: Graded<Enclosure>;
  /** Sets of the upper size: all of them up to symmetry (and up to `keep`) when the size is exact and they were listed. */
  sets: Uint32Array[];
  /** Number of smallest sets, when all were listed. */
  count?: number;
  nodes: number;
}

export interface StoppingBudget {
  /** Branches the search may open, some 5 to 10 million a second. */
  nodes: number;
  /** Sets kept for the list. */
  keep?: number;
  seed?: string;
  orbits?: TannerOrbits;
  onProgress?(share: number): void;
}

/** Smallest stopping sets: the erasures that peeling cannot begin to resolve. From below by the girth's tree and Tanner's
 *  eigenvalue bounds, which hold for stopping sets too (Orlitsky, Urbanke and Viswanathan 2002), then size by size by branch
 *  and bound; from above by light codewords and seeded descent. When the budget ends, an enclosure is left. */
export function smallestStoppingSets(H: SparseMatrix, options: StoppingBudget): StoppingSets {
  const { nodes, keep = 1000, seed = 'stopping', onProgress } = options;
  const orbits = options.orbits ?? tannerOrbits(H);
  const below = provedBelow(H, orbits, nodes);
  const quick = lightestFound(H, { seed, nodes: Math.min(nodes, QUICK_NODES), goal: below.value });
  if (!quick) {
    return { size: graded(0, 0, 'every erasure is resolved by peeling'), sets: [], nodes: 0 };
  }
  let lower = Math.min(below.value, quick.length);
  const search = new CheckSearch(H, orbits.columns, 'stopping');
  let left = nodes;
  for (let size = lower; size <= quick.length && left > 0; size++) {
    const report = (share: number) => onProgress?.(Math.min(1, 1 - (left / nodes) * (1 - share / 4)));
    const { sets, count, nodes: spent, finished } = search.ofSize({ size, nodes: left, keep, onProgress: report });
    left -= spent;
    if (count > 0) {
      // Sets of this size were met, and none of a smaller one exists.
      const method = finished ? 'branch and bound, every set of this size listed' : 'branch and bound';
      return { size: graded(size, size, method), sets, ...(finished && { count }), nodes: nodes - left };
    }
    if (!finished) break;
    lower = size + 1;
  }
  const longer = nodes > QUICK_NODES ? lightestFound(H, { seed: `${seed}/longer`, nodes, goal: lower }) : null;
  const found = longer && longer.length < quick.length ? longer : quick;
  const method = `below: ${lower > below.value ? 'branch and bound' : below.method}; above: a set found`;
  return { size: graded(lower, found.length, method), sets: [found], nodes: nodes - left };
}

/** Effort of the first look from above, which settles most small codes. */
const QUICK_NODES = 200_000;

function graded(lower: number, upper: number, method: string): Graded<Enclosure> {
  const grade = lower === upper ? 'computed' : 'bounded';
  return { value: { lower, upper }, grade, method, source: diProiettiTelatarRichardsonUrbanke2002 };
}

function provedBelow(H: SparseMatrix, orbits: TannerOrbits, nodes: number): Graded<number> {
  const bounds = [treeBound(girth(H, orbits), columnWeightProfile(H)[0]![0])];
  const spectrum = overlapSpectrum(H, orbits, { operations: 20 * nodes });
  if (spectrum) {
    const eigenvalue = [bitOrientedBound(H.cols, spectrum), parityOrientedBound(H.cols, spectrum)];
    bounds.push(...eigenvalue.filter((bound) => bound !== null));
  }
  return bounds.reduce((best, bound) => (bound.value > best.value ? bound : best));
}

/** A codeword or a set met by descent, whichever is smaller; neither is looked for below what is proved. */
function lightestFound(
  H: SparseMatrix,
  { seed, nodes, goal }: { seed: string; nodes: number; goal: number },
): Uint32Array | null {
  const descended = searchStoppingSets(H, { seed, edgeVisits: 4 * nodes, goal });
  if (!descended || descended.length <= goal || H.cols > LONGEST_FOR_WORDS) return descended;
  const word = searchLowWeight(H, { seed, wordOperations: 4 * nodes, goal });
  return word && word.weight < descended.length ? word.positions : descended;
}

/** The search for words begins with a dense elimination. */
const LONGEST_FOR_WORDS = 20_000;
