import { galoisField } from '../algebra/galois-field.ts';
import {
  degreeOf,
  dividePolynomials,
  type Gf2Polynomial,
  multiplyPolynomials,
  polynomialOf,
  remainderOf,
  xToTheNMinusOne,
} from '../algebra/gf2-polynomial.ts';
import { gcd } from '../algebra/integers.ts';
import { moduleRank } from './module-rank.ts';
import type { QuasiCyclicForm } from './quasi-cyclic.ts';
import { type SeriesMatrix, seriesRank } from './series-rank.ts';

/** Degrees of the irreducible factors whose fields are held in tables; above it polynomials are used. */
const LARGEST_TABLED_DEGREE = 14;

/** How x^size + 1 falls apart over GF(2): size = power · odd with a power of two, and x^size + 1 is the product over the
 *  divisors o of odd of Φ_o(x)^power, where Φ_o has φ(o)/degree irreducible factors of the same degree. */
interface Factorisation {
  power: number;
  parts: { order: number; degree: number; factors: number }[];
}

export function factorise(size: number): Factorisation {
  const power = size & -size;
  const odd = size / power;
  const parts = [];
  for (let order = 1; order <= odd; order++) {
    if (odd % order !== 0) continue;
    const degree = orderOfTwo(order);
    parts.push({ order, degree, factors: totient(order) / degree });
  }
  return { power, parts };
}

/** Rank of a quasi-cyclic matrix, block by block. GF(2)[x]/(x^size + 1) is by the Chinese remainder theorem the product of
 *  the rings GF(2)[x]/(f^power), f irreducible of some degree d, and x ↦ α + u makes each of them the truncated power
 *  series GF(2^d)[u]/(u^power), where α is a root of f. The rank is the sum over the f of d times the length of the row
 *  module there; for odd sizes that is d times the rank over GF(2^d) of the matrix evaluated at α (Ling and Solé 2001,
 *  On the algebraic structure of quasi-cyclic codes I, IEEE Trans. Inf. Theory 47, 2751–2760). Factors of large degree are
 *  taken together by elimination over GF(2)[x]. */
export function quasiCyclicRank(form: QuasiCyclicForm): number {
  const { power, parts } = factorise(form.size);
  const entries = entriesOf(form);
  let rank = 0;
  let rest: Gf2Polynomial | null = null;
  for (const { order, degree } of parts) {
    if (degree > LARGEST_TABLED_DEGREE) {
      const part = powerOfTwo(cyclotomic(order), power);
      rest = rest ? multiplyPolynomials(rest, part) : part;
      continue;
    }
    const field = galoisField(2 ** degree);
    const step = (field.q - 1) / order;
    for (const e of cosetLeaders(order)) {
      const length = seriesRank(
        field,
        evaluate(form, entries, field.exp, (step * e) % Math.max(1, field.q - 1), power),
      );
      rank += degree * length;
    }
  }
  if (!rest) return rank;
  const modulus = rest;
  const rows = entries.map((row) => row.map((offsets) => remainderOf(polynomialOf(offsets), modulus)));
  return rank + moduleRank(rows, modulus);
}

/** Operations of the method, about a nanosecond each, to weigh it against elimination of the whole. */
export function quasiCyclicWork({ size, blocks, generators }: QuasiCyclicForm): number {
  const { power, parts } = factorise(size);
  const rows = generators.length;
  const ones = generators.reduce((sum, row) => sum + row.length, 0);
  const pivots = Math.min(rows, blocks);
  let work = 0;
  let rest = 0;
  for (const { degree, factors } of parts) {
    if (degree > LARGEST_TABLED_DEGREE) rest += degree * factors * power;
    else work += 2 ** degree * 20 + factors * 3 * (ones * power + rows * pivots * blocks * power ** 2);
  }
  return work + (rows + blocks) * blocks * pivots * (rest === 0 ? 0 : rest ** 2 / 8 + 1500);
}

/** Offsets within each block: entries[row][block]. */
function entriesOf({ size, blocks, generators }: QuasiCyclicForm): number[][][] {
  return generators.map((row) => {
    const entries = Array.from({ length: blocks }, (): number[] => []);
    for (const c of row) entries[Math.floor(c / size)]!.push(c % size);
    return entries;
  });
}

/** Every entry as a power series in u at x = α + u, α the power `step` of the generator: x^a has binomial(a, i)·α^(a − i)
 *  before u^i, and the binomial is odd exactly when the digits of i are among those of a (Lucas 1878). */
function evaluate(
  { blocks }: QuasiCyclicForm,
  entries: readonly (readonly (readonly number[])[])[],
  exp: Uint32Array,
  step: number,
  power: number,
): SeriesMatrix {
  const order = Math.max(1, (exp.length - 1) / 2);
  const matrix: SeriesMatrix = {
    rows: entries.length,
    cols: blocks,
    length: power,
    values: new Uint32Array(entries.length * blocks * power),
  };
  entries.forEach((row, r) => {
    row.forEach((offsets, b) => {
      const at = (r * blocks + b) * power;
      for (const a of offsets) {
        for (let i = 0; i < power; i++) {
          if ((i & ~a) === 0) matrix.values[at + i]! ^= exp[((a - i) * step) % order]!;
        }
      }
    });
  });
  return matrix;
}

/** The least d ≥ 1 with 2^d ≡ 1 modulo an odd number. */
function orderOfTwo(odd: number): number {
  let d = 1;
  for (let x = 2 % odd; x !== 1 % odd; x = (2 * x) % odd) d++;
  return d;
}

/** One number of each class of units modulo an odd order under doubling. */
function cosetLeaders(order: number): number[] {
  const seen = new Uint8Array(order);
  const leaders: number[] = [];
  for (let e = 0; e < order; e++) {
    if (seen[e] || gcd(e, order) !== 1) continue;
    leaders.push(e);
    for (let x = e; !seen[x]; x = (2 * x) % order) seen[x] = 1;
  }
  return leaders;
}

function totient(n: number): number {
  let count = 0;
  for (let e = 0; e < n; e++) if (gcd(e, n) === 1) count++;
  return count;
}

/** Φ_n over GF(2): x^n + 1 without the Φ_o of the proper divisors o. */
function cyclotomic(n: number): Gf2Polynomial {
  let quotient = xToTheNMinusOne(n);
  for (let o = 1; o < n; o++) if (n % o === 0) quotient = dividePolynomials(quotient, cyclotomic(o)).quotient;
  return quotient;
}

/** f^power for a power of two: exponents multiply. */
function powerOfTwo(f: Gf2Polynomial, power: number): Gf2Polynomial {
  const exponents = [];
  for (let i = 0; i <= degreeOf(f); i++) if ((f[i >>> 5]! >>> (i & 31)) & 1) exponents.push(i * power);
  return polynomialOf(exponents);
}
