import { designFromBlocks } from '../../designs/block-design.ts';
import { mapsBlocksOntoThemselves } from '../../designs/block-symmetry.ts';
import type { ResolutionOutcome } from '../../designs/resolve.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { laps } from '../laps.ts';
import type { Property } from '../properties.ts';
import { type ConstantWeightCode, complementWords, wordOf } from './constant-weight-code.ts';
import { disjunctness } from './disjunctness.ts';
import { type OpticalOrthogonalCode, opticalOrthogonalFromDesign } from './optical-orthogonal.ts';
import { propertyLines } from './sheet-lines.ts';
import { type SizeVerdict, sizeVerdict } from './size-verdict.ts';
import { parallelClassesOf } from './word-classes.ts';

/** All that is told of a constant-weight code. */
export interface ConstantWeightSheet {
  n: number;
  w: number;
  M: number;
  distance: Graded<Enclosure>;
  /** Null where the distance is not known exactly, or words repeat. */
  size: SizeVerdict | null;
  /** ⌊log2 M⌋ bits that a word carries. */
  messageBits: number;
  /** 2w = n: as many ones as zeros in every word. */
  balanced: boolean;
  /** Errors of any kind that nearest-word decoding always corrects, and that a decoder which only detects always sees. */
  correctionRadius: Graded<number>;
  detectionRadius: Graded<number>;
  disjunctness: Graded<Enclosure>;
  /** Least and most words that hold a one at a position: sizes of the codes shortened there. */
  wordsOnPosition: Enclosure;
  /** Whether the words fall into parallel classes. */
  resolution: ResolutionOutcome;
  /** The optical orthogonal code of the orbits, where p → p + 1 keeps the words. */
  optical: OpticalOrthogonalCode | null;
  /** The same, as lines ready to show. */
  properties: Property[];
}

export interface SheetBudget {
  /** Nodes of the search for parallel classes. */
  resolutionNodes?: number;
  /** Steps of the search for covers of a word. */
  coverSteps?: number;
  /** Milliseconds; with it the lines that take time say how much. */
  clock?(): number;
}

/** Words beyond which parallel classes are not searched for unless a budget is given. */
const SEARCHED_WORDS = 2000;

/** Analyses a constant-weight code. Searches stop at their budgets and leave bounds. */
export function constantWeightSheet(code: ConstantWeightCode, budget: SheetBudget = {}): ConstantWeightSheet {
  const { n, w, M, distanceEvidence } = code;
  const least = distanceEvidence.value.lower;
  const { grade, method } = distanceEvidence;
  const lap = laps(budget.clock);
  const times = new Map<string, number | undefined>();
  const timed = <T>(key: string, value: T): T => {
    times.set(key, lap());
    return value;
  };
  const values = {
    n,
    w,
    M,
    distance: distanceEvidence,
    size: timed('optimality', sizeVerdict(code)),
    messageBits: M < 1 ? 0 : Math.floor(Math.log2(M)),
    balanced: 2 * w === n,
    correctionRadius: { value: Math.max(0, Math.floor((least - 1) / 2)), grade, method },
    detectionRadius: { value: Math.max(0, least - 1), grade, method },
    disjunctness: timed('disjunct', disjunctness(code, budget.coverSteps)),
    wordsOnPosition: timed('shortened', wordsOnPosition(code)),
    resolution: timed('classes', resolutionOf(code, budget.resolutionNodes)),
    optical: timed('optical', opticalOf(code)),
  };
  const properties = propertyLines(values, code).map((line) => {
    const elapsedMs = times.get(line.key);
    return elapsedMs === undefined ? line : { ...line, elapsedMs };
  });
  return { ...values, properties };
}

/** A search node of a large code is dear, so that the page is not kept waiting for what a deeper look can be asked for. */
function resolutionOf(code: ConstantWeightCode, nodes = code.M <= SEARCHED_WORDS ? 50_000 : 0): ResolutionOutcome {
  const outcome = parallelClassesOf(code, { limit: nodes });
  if (outcome.reason !== 'limit' || nodes > 0) return outcome;
  return { ...outcome, detail: `not given, and not searched for beyond ${SEARCHED_WORDS} words` };
}

function wordsOnPosition({ n, ones }: ConstantWeightCode): Enclosure {
  const counts = new Uint32Array(n);
  for (const p of ones) counts[p]!++;
  let [lower, upper] = [Number.POSITIVE_INFINITY, 0];
  for (const count of counts) {
    if (count < lower) lower = count;
    if (count > upper) upper = count;
  }
  return { lower, upper };
}

function opticalOf(code: ConstantWeightCode): OpticalOrthogonalCode | null {
  const words = code.complement ? complementWords(code) : code;
  if (words.M === 0 || words.w === 0 || words.n < 2) return null;
  const design = designFromBlocks(
    words.n,
    Array.from({ length: words.M }, (_, i) => wordOf(words, i)),
  );
  const shift = Uint32Array.from({ length: words.n }, (_, p) => (p + 1) % words.n);
  return mapsBlocksOntoThemselves(design, shift) ? opticalOrthogonalFromDesign(design) : null;
}
