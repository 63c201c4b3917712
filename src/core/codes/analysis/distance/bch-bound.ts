import { galoisField } from '../../../algebra/galois-field.ts';
import { exponentsOf } from '../../../algebra/gf2-polynomial.ts';
import { gcd } from '../../../algebra/integers.ts';
import type { Citation } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';
import { cyclicGenerator } from '../../encode/generator-polynomial.ts';
import type { SparseMatrix } from '../../sparse-matrix.ts';

const bch: Citation = {
  authors: 'R. C. Bose, D. K. Ray-Chaudhuri',
  year: 1960,
  title: 'On a class of error correcting binary group codes',
  where: 'Inform. and Control 3, 68–79',
  part: 'with A. Hocquenghem, Chiffres 2 (1959) 147–156: δ − 1 consecutive zeros give distance δ',
};

/** Largest m for which the field of the n-th roots of unity, GF(2^m), is tabled. */
const LARGEST_DEGREE = 22;

export interface BchRun {
  distance: number;
  /** The zeros are β^start, β^(start + step), …, distance − 1 of them. */
  start: number;
  step: number;
}

/** The longest run of zeros of the generator polynomial in arithmetic progression, over all steps prime to n. Null when the
 *  code is not cyclic, n is even (n-th roots of unity are then not all distinct), the field passes GF(2^22), or k = 0. */
export function longestBchRun(H: SparseMatrix): BchRun | null {
  const n = H.cols;
  if (n % 2 === 0 || n < 3) return null;
  const degree = orderOfTwo(n);
  if (degree > LARGEST_DEGREE) return null;
  const zeros = zerosOfGenerator(H, degree);
  if (!zeros || zeros.every((zero) => zero === 1)) return null;
  let best: BchRun = { distance: 1, start: 0, step: 1 };
  for (const step of stepsOf(n)) {
    const { length, start } = longestRun(zeros, step);
    if (length + 1 > best.distance) best = { distance: length + 1, start, step };
  }
  return best;
}

/** The BCH bound. The progression's step may be any number prime to n, since β may be any primitive root. */
export function bchBound(H: SparseMatrix): Graded<number> | null {
  const run = longestBchRun(H);
  if (!run) return null;
  const { distance, start, step } = run;
  const by = step === 1 ? '' : ` in steps of ${step}`;
  const method = `BCH bound: ${distance - 1} zeros of the generator from β^${start} on${by}`;
  return { value: distance, grade: 'proved', method, source: bch };
}

/** Flags of the e with g(β^e) = 0, one evaluation a cyclotomic coset. */
function zerosOfGenerator(H: SparseMatrix, degree: number): Uint8Array | null {
  const g = cyclicGenerator(H);
  if (!g) return null;
  const n = H.cols;
  const { exp, q } = galoisField(2 ** degree);
  const step = (q - 1) / n;
  const exponents = exponentsOf(g);
  const zeros = new Uint8Array(n);
  const seen = new Uint8Array(n);
  for (let e = 0; e < n; e++) {
    if (seen[e]) continue;
    let value = 0;
    for (const i of exponents) value ^= exp[((i * e) % n) * step]!;
    for (let x = e; !seen[x]; x = (2 * x) % n) {
      seen[x] = 1;
      zeros[x] = value === 0 ? 1 : 0;
    }
  }
  return zeros;
}

/** Numbers prime to n, one of each class under doubling and sign: those map runs to runs of the same zeros. */
function stepsOf(n: number): number[] {
  const seen = new Uint8Array(n);
  const steps: number[] = [];
  for (let a = 1; a < n; a++) {
    if (seen[a] || gcd(a, n) !== 1) continue;
    steps.push(a);
    for (let x = a; !seen[x]; x = (2 * x) % n) seen[x] = seen[n - x] = 1;
  }
  return steps;
}

function longestRun(zeros: Uint8Array, step: number): { length: number; start: number } {
  const n = zeros.length;
  let best = { length: 0, start: 0 };
  let length = 0;
  // Begins at a place that is no zero, so that no run is cut in two.
  const from = zeros.indexOf(0);
  for (let i = 1, at = (from + step) % n; i <= n; i++, at = (at + step) % n) {
    if (zeros[at]) length++;
    else {
      if (length > best.length) best = { length, start: (((at - length * step) % n) + n) % n };
      length = 0;
    }
  }
  return best;
}

function orderOfTwo(odd: number): number {
  let d = 1;
  for (let x = 2 % odd; x !== 1; x = (2 * x) % odd) d++;
  return d;
}
