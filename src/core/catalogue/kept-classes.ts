import { factor } from '../algebra/integers.ts';
import type { DesignSpec } from '../designs/block-design.ts';
import type { CodePrediction, DesignPrediction } from '../designs/family.ts';
import { treeBound } from '../designs/partial-linear-prediction.ts';
import { logBinomialTerm } from '../statistics/binomial-term.ts';
import type { Entry, Known } from './entry.ts';
import { girthCeiling } from './girth-ceiling.ts';

/** Largest column weight for which nets are offered with every number of classes; the code of weight w that keeps c
 *  classes is the transpose of the one of weight c that keeps w, so that only c above w is listed. */
const MAX_NET_WEIGHT = 5;

/** A resolvable design, two points on at most one block, as its parts by classes need it. */
interface Whole {
  design: DesignSpec;
  prediction: DesignPrediction;
  /** Blocks in a class. */
  perClass: number;
  isPlane: boolean;
  isNet: boolean;
  /** A net over the integers modulo an odd squarefree number: an array of circulants. */
  isCirculant: boolean;
  /** The prime whose power the blocks of a class are; undefined when they are no such number. */
  prime: number | undefined;
  /** The code that keeps every class, by orientation. */
  codes: Record<Entry['checks'], CodePrediction>;
}

/** The codes that keep some of its parallel classes: 3 … r − 1 of them in both orientations, of nets in the one where
 *  classes are runs of bits (the shortened array codes). */
export function* keptClassEntries(design: DesignSpec, p: DesignPrediction, maxLength: number): Iterable<Entry> {
  if (!p.resolvable || !(p.partialLinear || (p.t === 2 && p.lambda === 1)) || p.codes.length === 0) return;
  if (design.family === 'transversal' && p.k > MAX_NET_WEIGHT) return;
  const whole = wholeOf(design, p);
  for (let classes = whole.isNet ? p.k + 1 : 3; classes < p.r; classes++) {
    if (!whole.isNet) yield keptEntry(whole, 'blocks', classes);
    if (classes * whole.perClass <= maxLength) yield keptEntry(whole, 'points', classes);
  }
}

/** What closed formulas say of one such code. */
export const keptClassEntry = (
  design: DesignSpec,
  p: DesignPrediction,
  checks: Entry['checks'],
  classes: number,
): Entry => keptEntry(wholeOf(design, p), checks, classes);

function wholeOf(design: DesignSpec, prediction: DesignPrediction): Whole {
  const perClass = prediction.v / prediction.k;
  const isNet = design.family === 'transversal';
  const factors = factor(perClass);
  const isCirculant = isNet && perClass % 2 === 1 && factors.every(({ m }) => m === 1);
  const codeOf = (checks: Entry['checks']) =>
    prediction.codes.find((code) => code.checks === checks) ?? prediction.codes[0]!;
  return {
    design,
    prediction,
    perClass,
    isPlane: design.family === 'affine-plane',
    isNet,
    isCirculant,
    prime: factors.length === 1 ? factors[0]!.p : undefined,
    codes: { blocks: codeOf('blocks'), points: codeOf('points') },
  };
}

function keptEntry(whole: Whole, checks: Entry['checks'], classes: number): Entry {
  const { v, k } = whole.prediction;
  const code = whole.codes[checks];
  const n = checks === 'blocks' ? v : classes * whole.perClass;
  const [columnWeight, rowWeight] = checks === 'blocks' ? [classes, k] : [k, classes];
  const rank = rankOfKept(whole, classes, code);
  const girth = girthOfKept(whole, classes, code.girth.value.lower);
  return {
    design: whole.design,
    checks,
    keptClasses: classes,
    n,
    rank,
    girth,
    distance: distanceOfKept(whole, checks, columnWeight, n, rank, girth),
    radius: Math.floor(columnWeight / 2),
    radiusGrade: 'proved',
    columnWeight,
    rowWeight,
    // The circulants of a net run within its classes, so that whole classes keep them.
    structure: whole.isNet ? code.structure : 'none',
    resolvable: true,
  };
}

/** Every class sums to the all-one vector, so c classes of v/k blocks have rank c·(v/k) − (c − 1) at most.
 *  Planes of odd order: N·Nᵀ = I + (J − I) ⊗ J modulo 2 has rank c·(q − 1) + 1, which meets that.
 *  Arrays of circulants: at each g-th root of unity other than 1 they are a Vandermonde matrix on k distinct nodes, of rank
 *  min(k, c), and at 1 of rank 1 (Fan 2000). */
function rankOfKept(
  { prediction, perClass, isPlane, isNet, isCirculant, prime }: Whole,
  classes: number,
  code: CodePrediction,
): Known {
  const { v, k } = prediction;
  if (isPlane && k % 2 === 1) return exact(classes * (perClass - 1) + 1, 'c(q − 1) + 1, the rank of N·Nᵀ modulo 2');
  if (isCirculant)
    return exact((perClass - 1) * Math.min(k, classes) + 1, 'array of circulants: Vandermonde at each root of unity');
  const b = classes * perClass;
  const upper = Math.min(b - classes + 1, v, code.rank.value.upper);
  const known = isNet
    ? rowsOfTwoGroups(perClass, prime, classes)
    : Math.max(packedRank(v, treeBound(classes, 6)), packedRank(b, treeBound(k, 6)));
  const lower = Math.min(upper, Math.max(perClass, known));
  const method = isNet ? netRank : classRank;
  return { lower, upper, grade: lower === upper ? 'proved' : 'bounded', method };
}

const netRank = 'rows of two groups below; every class sums to the all-one vector above';
const classRank = 'one class, sphere packing below; every class sums to the all-one vector above';
const exact = (value: number, method: string): Known => ({ lower: value, upper: value, grade: 'proved', method });

const SIX = exact(6, 'a triangle of three classes closes a 6-cycle');

/** Redundancy holds the patterns of half the distance: at least the logarithm of their last shell (Hamming 1950). */
function packedRank(n: number, distance: number): number {
  const w = Math.min(n, Math.floor((distance - 1) / 2));
  return Math.ceil(n + logBinomialTerm(n, w, 0.5) * Math.LOG2E - 1e-6);
}

/** The rows of the first two groups of a net over GF(g) are a graph on 2g vertices, joined through the sums of the first c
 *  elements: g over the order of the subgroup that these span is its number of components. Products of fields number
 *  their elements otherwise; of them only one group is counted. */
function rowsOfTwoGroups(g: number, prime: number | undefined, classes: number): number {
  if (prime === undefined) return g;
  let spanned = 1;
  while (spanned < classes) spanned *= prime;
  return 2 * g - g / Math.min(g, spanned);
}

/** Three lines of different directions of a plane that do not all meet close a 6-cycle, and so do the classes 0, 1, 2 of
 *  an array of circulants in its first three rows (1 + 1 = 2). Elsewhere the graph may have room for more. */
function girthOfKept({ prediction, perClass, isPlane, isCirculant }: Whole, classes: number, lower: number): Known {
  if (isPlane || isCirculant) return SIX;
  const upper = girthCeiling({ v: prediction.v, b: classes * perClass, k: prediction.k, r: classes });
  const method = 'a part of the whole below; room for a tree (Moore) above';
  return { lower, upper, grade: lower === upper ? 'proved' : 'bounded', method };
}

/** Below: the tree bound, made even where blocks are bits of a net, since the rows of a group sum to the all-one word.
 *  Above: Singleton; where blocks are bits two classes, which meet every check once each; where points are bits of a plane
 *  two lines of a class that was dropped, which do so too. */
function distanceOfKept(
  { prediction, perClass, isPlane, isNet }: Whole,
  checks: Entry['checks'],
  columnWeight: number,
  n: number,
  rank: Known,
  girth: Known,
): Known {
  if (rank.lower === n) return exact(0, 'the code holds only the zero word');
  const atHand = checks === 'points' ? 2 * perClass : isPlane ? 2 * prediction.k : n;
  const most = Math.min(rank.upper === n ? n : rank.upper + 1, atHand);
  const tree = treeBound(columnWeight, girth.lower);
  const least = Math.min(most, isNet ? tree + (tree % 2) : tree);
  const lower = rank.upper === n ? 0 : least;
  return { lower, upper: most, grade: lower === most ? 'proved' : 'bounded', method: keptDistance };
}

const keptDistance = 'tree bound (Tanner 1981) below; Singleton or a word of two classes above';
