import { z } from 'zod';
import { isPrime, primePowerOf } from '../../algebra/integers.ts';
import { type SeededRandom, seededRandom } from '../../algebra/seeded-random.ts';
import { type Citation, InfeasibleError, LimitError, ParamError } from '../../errors.ts';
import type { BlockDesign, DesignSpec } from '../block-design.ts';
import { cyclicSymmetry, developTriples } from '../develop.ts';
import { defineFamily } from '../family.ts';
import { affineTriples, nettoTriples, projectiveTriples } from '../triple-systems/algebraic.ts';
import { boseTriples } from '../triple-systems/bose.ts';
import { climbTriples } from '../triple-systems/hill-climbing.ts';
import { removePasches } from '../triple-systems/pasch-removal.ts';
import { cyclicBaseTriples } from '../triple-systems/peltesohn.ts';
import { predictTripleSystem } from '../triple-systems/prediction.ts';
import { skolemTriples } from '../triple-systems/skolem.ts';

/** Largest number of points built here. */
export const MAX_TRIPLE_POINTS = 3000;

/** Largest order on which the descent that removes Pasches is tried, and its budget. */
const MAX_PASCH_REMOVAL_POINTS = 45;
const PASCH_MOVES = 600_000;
const PASCH_STARTS = 10;

const PELTESOHN: Citation = {
  authors: 'R. Peltesohn',
  year: 1939,
  title: 'Eine Lösung der beiden Heffterschen Differenzenprobleme',
  where: 'Compositio Math. 6, 251–257',
};
const ANTI_PASCH: Citation = {
  authors: 'M. J. Grannell, T. S. Griggs, C. A. Whitehead',
  year: 2000,
  title: 'The resolution of the anti-Pasch conjecture',
  where: 'J. Combin. Des. 8, 300–309',
};

const METHODS = ['bose', 'skolem', 'cyclic', 'affine', 'projective', 'netto', 'random', 'anti-pasch'] as const;
const SEEDED: readonly string[] = ['random', 'anti-pasch'];

const schema = z.strictObject({
  v: z.number().int().min(3).max(MAX_TRIPLE_POINTS),
  method: z.enum(METHODS),
  seed: z.string().min(1).max(64).optional(),
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
    {
      name: 'seed',
      label: 'seed of the search',
      kind: 'text',
      accepted: 'a text of 1 to 64 characters, with method random or anti-pasch only',
      example: '1',
      optional: true,
    },
  ],
  source: {
    authors: 'T. P. Kirkman',
    year: 1847,
    title: 'On a problem in combinations',
    where: 'Cambridge and Dublin Math. J. 2, 191–204',
  },
  schema,
  require(params) {
    requireTripleOrder(params.v);
    requireMethodReaches(params);
  },
  *enumerate({ maxPoints, maxBlocks }): Generator<Params> {
    for (let v = 7; v <= Math.min(maxPoints, MAX_TRIPLE_POINTS) && (v * (v - 1)) / 6 <= maxBlocks; v++) {
      if (v % 6 !== 1 && v % 6 !== 3) continue;
      for (const method of METHODS) if (!SEEDED.includes(method) && reaches(method, v)) yield { v, method };
    }
  },
  predict: predictTripleSystem,
  build: buildTripleSystem,
});

/** Whether a construction gives a system on v ≡ 1, 3 (mod 6) points. */
function reaches(method: Params['method'], v: number): boolean {
  switch (method) {
    case 'bose':
      return v % 6 === 3;
    case 'skolem':
      return v % 6 === 1;
    case 'cyclic':
      return v !== 9;
    case 'affine':
      return primePowerOf(v)?.p === 3;
    case 'projective':
      return primePowerOf(v + 1)?.p === 2;
    case 'netto':
      return v % 12 === 7 && primePowerOf(v) !== null;
    case 'random':
      return true;
    case 'anti-pasch':
      return isPaschFreeBose(v) || isPaschFreeNetto(v) || v <= MAX_PASCH_REMOVAL_POINTS;
  }
}

const REACH: Record<Params['method'], string> = {
  bose: 'v ≡ 3 (mod 6) for method bose; v ≡ 1 (mod 6) takes skolem',
  skolem: 'v ≡ 1 (mod 6) for method skolem; v ≡ 3 (mod 6) takes bose',
  cyclic: 'any v but 9 for method cyclic',
  affine: 'a power of 3 for method affine',
  projective: '2^(m+1) − 1 for method projective',
  netto: 'a prime power ≡ 7 (mod 12) for method netto',
  random: 'any admissible v',
  'anti-pasch': `v ≡ 3 (mod 6) with v/3 prime to 7, a prime power ≡ 19 (mod 24), or v at most ${MAX_PASCH_REMOVAL_POINTS}, for method anti-pasch`,
};

function requireMethodReaches({ v, method, seed }: Params): void {
  if (method === 'cyclic' && v === 9) {
    throw new InfeasibleError(
      'peltesohn',
      'A cyclic triple system exists for every admissible v except 9.',
      PELTESOHN,
      'v',
    );
  }
  if (method === 'anti-pasch' && (v === 7 || v === 13)) {
    const statement = `Every triple system on ${v} points holds a Pasch configuration; 7 and 13 are the only such orders.`;
    throw new InfeasibleError('anti-pasch', statement, ANTI_PASCH, 'v');
  }
  if (!reaches(method, v)) throw new ParamError('v', v, REACH[method]);
  if (seed !== undefined && !SEEDED.includes(method)) {
    throw new ParamError('seed', seed, 'no seed: only methods random and anti-pasch search');
  }
}

function buildTripleSystem({ v, method, seed = '1' }: Params): BlockDesign {
  switch (method) {
    case 'bose':
      return tripleDesign(v, boseTriples(v));
    case 'skolem':
      return tripleDesign(v, skolemTriples(v));
    case 'cyclic':
      return tripleDesign(v, developTriples(v, cyclicBaseTriples(v)), { symmetry: cyclicSymmetry(v) });
    case 'affine': {
      const { triples, classes } = affineTriples(v);
      return tripleDesign(v, triples, { classes });
    }
    case 'projective':
      return tripleDesign(v, projectiveTriples(v), { symmetry: cyclicSymmetry(v) });
    case 'netto':
      return tripleDesign(v, nettoTriples(v), { symmetry: isPrime(v) ? cyclicSymmetry(v) : undefined });
    case 'random':
      return tripleDesign(v, climbOrStop(v, seededRandom(seed)));
    case 'anti-pasch':
      return tripleDesign(v, paschFreeTriples(v, seed));
  }
}

/** Bose's system over Z_m has no Pasch exactly when 7 does not divide m (Brouwer 1977; checked by count in the tests).
 *  Elsewhere a seeded descent. @throws LimitError when its budget is spent with Pasches left. */
function paschFreeTriples(v: number, seed: string): Uint32Array {
  if (isPaschFreeBose(v)) return boseTriples(v);
  if (isPaschFreeNetto(v)) return nettoTriples(v);
  const random = seededRandom(seed);
  let fewest = Number.POSITIVE_INFINITY;
  for (let start = 0; start < PASCH_STARTS; start++) {
    const { triples, pasches } = removePasches(v, climbOrStop(v, random), random, PASCH_MOVES / PASCH_STARTS);
    if (pasches === 0) return triples;
    fewest = Math.min(fewest, pasches);
  }
  throw new LimitError(
    `removing Pasches with seed "${seed}", ${fewest} left at best`,
    PASCH_MOVES + 1,
    PASCH_MOVES,
    'moves',
  );
}

/** Netto's system has no Pasch when q ≡ 19 (mod 24). Source: R. M. Robinson, Math. Comp. 29 (1975) 223–241. */
function isPaschFreeNetto(v: number): boolean {
  return v % 24 === 19 && primePowerOf(v) !== null;
}

function isPaschFreeBose(v: number): boolean {
  return v % 6 === 3 && (v / 3) % 7 !== 0;
}

function climbOrStop(v: number, random: SeededRandom): Uint32Array {
  const triples = climbTriples(v, random);
  if (!triples) throw new LimitError('hill climbing', 200 * v * v + 1, 200 * v * v, 'steps');
  return triples;
}

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
