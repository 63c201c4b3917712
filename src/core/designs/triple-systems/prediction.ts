import { isPrime } from '../../algebra/integers.ts';
import type { Enclosure, Graded } from '../../evidence.ts';
import { predictTwoDesignCodes } from '../code-prediction.ts';
import type { DesignPrediction } from '../family.ts';
import { between, exactly } from '../partial-linear-prediction.ts';

/** What formulas say of a triple system on v points made by a method of the family. */
export function predictTripleSystem({ v, method }: { v: number; method: string }): DesignPrediction {
  const b = (v * (v - 1)) / 6;
  const counts = { v, b, k: 3, r: (v - 1) / 2, lambda: 1 };
  const rank = rankByMethod(v, method);
  const cyclic = method === 'cyclic' || method === 'projective' || (method === 'netto' && isPrime(v));
  const distance = distanceOfTripleCode(v, method);
  return {
    t: 2,
    ...counts,
    ...(method === 'affine' ? { resolvable: true } : {}),
    ...(cyclic ? { cyclic } : {}),
    codes: predictTwoDesignCodes(counts, {
      rank,
      distance: { points: distance },
      cyclic,
    }),
  };
}

function rankByMethod(v: number, method: string): Graded<Enclosure> {
  if (method === 'bose' || method === 'skolem' || v <= 7) return rankOfDirectSystem(v);
  if (method === 'projective') return exactly(v - Math.log2(v + 1), 'proved', 'Doyen–Hubaut–Vandensavel 1978');
  // A subsystem of AG(m,3) has a power of 3 points, never (v − 1)/2 once v > 3.
  if (method === 'affine' && v > 3) return exactly(v, 'proved', 'Doyen–Hubaut–Vandensavel 1978');
  return rankOfTripleSystem(v);
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
function distanceOfTripleCode(v: number, method: string): Graded<Enclosure> {
  if (v === 3) return exactly(0, 'proved', 'the code holds only the zero word');
  if (v === 7) return exactly(4, 'proved', 'the plane of order 2: [7,3,4]');
  if (v === 9) return exactly(6, 'proved', 'AG(2,3) has no Pasch and six lines cover its grid evenly');
  if (method === 'projective') return exactly(4, 'proved', 'every plane of PG(m,2) holds Pasch configurations');
  const paschFree = method === 'affine' || method === 'anti-pasch';
  return between(paschFree ? 6 : 4, 8, 'even sets of triples (Fujiwara–Colbourn 2010)');
}
