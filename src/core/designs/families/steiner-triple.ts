import { z } from 'zod';
import { InfeasibleError, ParamError } from '../../errors.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import type { BlockDesign, DesignSpec } from '../block-design.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import { type DesignPrediction, defineFamily } from '../family.ts';
import { boseTriples } from '../triple-systems/bose.ts';
import { skolemTriples } from '../triple-systems/skolem.ts';

/** Largest number of points built here. */
export const MAX_TRIPLE_POINTS = 3000;

const METHODS = ['bose', 'skolem'] as const;

const schema = z.strictObject({
  v: z.number().int().min(3).max(MAX_TRIPLE_POINTS),
  method: z.enum(METHODS),
});
type Params = z.infer<typeof schema>;

/** Steiner triple systems S(2,3,v): every pair of the v points in exactly one of v(v−1)/6 triples.
 *  @throws InfeasibleError unless v ≡ 1 or 3 (mod 6). @throws ParamError when the method does not reach v. */
export const steinerTriple = defineFamily({
  id: 'steiner-triple',
  title: 'Steiner triple system',
  params: [
    {
      name: 'v',
      label: 'points v',
      kind: 'integer',
      accepted: `an integer ≡ 1 or 3 (mod 6) from 3 to ${MAX_TRIPLE_POINTS}`,
      example: 15,
    },
    {
      name: 'method',
      label: 'construction',
      kind: 'choice',
      accepted: `one of ${METHODS.join(', ')}`,
      choices: METHODS,
      example: 'bose',
    },
  ],
  source: {
    authors: 'T. P. Kirkman',
    year: 1847,
    title: 'On a problem in combinations',
    where: 'Cambridge and Dublin Math. J. 2, 191–204',
  },
  schema,
  require({ v, method }) {
    requireTripleOrder(v);
    if (method === 'bose' && v % 6 !== 3)
      throw new ParamError('v', v, `v ≡ 3 (mod 6) for method bose; v = ${v} takes skolem`);
    if (method === 'skolem' && v % 6 !== 1)
      throw new ParamError('v', v, `v ≡ 1 (mod 6) for method skolem; v = ${v} takes bose`);
  },
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let v = 7; v <= Math.min(maxPoints, MAX_TRIPLE_POINTS) && (v * (v - 1)) / 6 <= maxBlocks; v++) {
      if (v % 6 === 3) yield { v, method: 'bose' };
      if (v % 6 === 1) yield { v, method: 'skolem' };
    }
  },
  predict: predictTripleSystem,
  build: ({ v, method }) => tripleDesign(v, method === 'bose' ? boseTriples(v) : skolemTriples(v)),
});

/** @throws InfeasibleError unless v ≡ 1 or 3 (mod 6), naming the nearest orders on both sides. */
export function requireTripleOrder(v: number): void {
  if (v % 6 === 1 || v % 6 === 3) return;
  const admissible = (x: number) => x % 6 === 1 || x % 6 === 3;
  let below = v;
  while (!admissible(below)) below--;
  let above = v;
  while (!admissible(above)) above++;
  throw new InfeasibleError(
    'divisibility',
    `A Steiner triple system needs v ≡ 1 or 3 (mod 6), so none has v = ${v} points: (v − 1)/2 triples on a point and ` +
      `v(v − 1)/6 in all must be whole numbers. The nearest that exist have v = ${below} and v = ${above}.`,
    steinerTriple.source,
    'v',
  );
}

/** Packs triples given one after the other; each is sorted in place. Asserts their number. */
export function tripleDesign(
  v: number,
  triples: Uint32Array,
  extra: Pick<BlockDesign, 'classes' | 'symmetry'> & { spec?: DesignSpec } = {},
): BlockDesign {
  const b = (v * (v - 1)) / 6;
  if (triples.length !== 3 * b)
    throw new Error(`a triple system on ${v} points has ${b} triples, not ${triples.length / 3}`);
  sortTriples(triples);
  return { v, b, blockStart: Uint32Array.from({ length: b + 1 }, (_, i) => 3 * i), blockPoints: triples, ...extra };
}

function sortTriples(triples: Uint32Array): void {
  for (let e = 0; e < triples.length; e += 3) {
    const [x, y, z] = [triples[e]!, triples[e + 1]!, triples[e + 2]!];
    const low = Math.min(x, y, z);
    const high = Math.max(x, y, z);
    triples[e] = low;
    triples[e + 1] = x + y + z - low - high;
    triples[e + 2] = high;
  }
}

function predictTripleSystem({ v, method }: Params): DesignPrediction {
  const b = (v * (v - 1)) / 6;
  const counts = { v, b, k: 3, r: (v - 1) / 2, lambda: 1 };
  const rank = method === 'bose' || method === 'skolem' ? rankOfDirectSystem(v) : rankOfTripleSystem(v);
  return {
    t: 2,
    ...counts,
    codes: predictTwoDesignCodes(counts, { rank, distance: { points: distanceOfTripleCode(v) } }),
  };
}

/** Rank over GF(2) of the systems of Bose and Skolem: v, but for v = 3 (one block) and v = 7 (the plane of order 2).
 *  A vector f orthogonal to every block has f(x,j) + f(y,j) = f(x∘y, j+1). Adding these over the pairs with x∘y fixed
 *  gives f(z,j+1) as a constant, or a constant plus f(z,j), and going round the three levels forces f = 0 as soon as
 *  the quasigroup has two pairs of one level with the same product.
 *  The general theory is Doyen, Hubaut, Vandensavel, Math. Z. 163 (1978) 251–259. */
function rankOfDirectSystem(v: number): Graded<Enclosure> {
  const rank = v === 3 ? 1 : v === 7 ? 4 : v;
  return { value: { lower: rank, upper: rank }, grade: 'proved', method: 'no vector meets every block evenly' };
}

/** For any triple system: v − d, where 2^d − 1 counts the subsystems on (v − 1)/2 points; d ≤ log₂(v + 1) with
 *  equality for the projective ones alone. Such a subsystem needs (v − 1)/2 ≡ 1, 3 (mod 6), so d = 0 when v ≡ 1, 9 (mod 12).
 *  Source: Doyen, Hubaut, Vandensavel 1978. */
export function rankOfTripleSystem(v: number): Graded<Enclosure> {
  const half = (v - 1) / 2;
  const mayHaveHyperplane = half % 6 === 1 || half % 6 === 3;
  const lower = mayHaveHyperplane ? v - Math.floor(Math.log2(v + 1)) : v;
  return {
    value: { lower, upper: v },
    grade: lower === v ? 'proved' : 'bounded',
    method: 'Doyen–Hubaut–Vandensavel 1978',
  };
}

/** A word of the code with checks = points is a set of triples that covers every point evenly. Three points a triple
 *  make its weight even; weight 2 is impossible, weight 4 is a Pasch configuration, and some word has weight 6 or 8
 *  at most (no system with v > 3 is 8-even-free: Fujiwara and Colbourn, IEEE Trans. Inf. Theory 56 (2010) 3196–3206). */
function distanceOfTripleCode(v: number): Graded<Enclosure> {
  if (v === 3) return { value: { lower: 0, upper: 0 }, grade: 'proved', method: 'the code holds only the zero word' };
  if (v === 7) return { value: { lower: 4, upper: 4 }, grade: 'proved', method: 'the plane of order 2: [7,3,4]' };
  return { value: { lower: 4, upper: 8 }, grade: 'bounded', method: 'even sets of triples (Fujiwara–Colbourn 2010)' };
}
