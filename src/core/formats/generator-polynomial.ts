import {
  degreeOf,
  dividePolynomials,
  equalPolynomials,
  exponentsOf,
  type Gf2Polynomial,
  polynomialOf,
  xToTheNMinusOne,
} from '../algebra/gf2-polynomial.ts';
import { cyclicGenerator } from '../codes/encode/generator-polynomial.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, ParamError } from '../errors.ts';
import { polynomialFromHex, polynomialToHex } from './hexadecimal.ts';
import { linesOf } from './keyed-lines.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';

/** The generator polynomial of a cyclic code: its exponents, and the same as one number.
 *  @throws ParamError when the code is not cyclic. */
export function writeGeneratorPolynomial(H: SparseMatrix): Uint8Array {
  const g = cyclicGenerator(H);
  if (!g) throw new ParamError('form', 'polynomial', 'a matrix whose rows are closed under the cyclic shift');
  const degree = degreeOf(g);
  const text = `# generator polynomial g(x) of the cyclic code { c : H c = 0 }
# the word c_0 ... c_(n-1) is the polynomial c_0 + c_1 x + ... ; codewords are the multiples of g modulo x^n + 1
# systematic: c(x) = x^(n-k) m(x) + (x^(n-k) m(x) mod g(x)), information in positions n-k to n-1
n=${H.cols}
k=${H.cols - degree}
degree=${degree}
exponents=${exponentsOf(g).join(' ')}
# bit i of this number is the coefficient of x^i
hexadecimal=${polynomialToHex(g)}
`;
  return new TextEncoder().encode(text);
}

/** Reads such a file and holds its parts against each other.
 *  @throws FormatError with line and column; LimitError on size. */
export function readGeneratorPolynomial(bytes: Uint8Array): { n: number; g: Gf2Polynomial } {
  const lines = linesOf(bytes);
  const n = lines.number('n', 1);
  refuseBeyondLimits(0, n, 0);
  const { text, line } = lines.value('exponents');
  const exponents = text.split(/\s+/).map(Number);
  if (exponents.some((e, i) => !Number.isInteger(e) || e < 0 || e > n || (i > 0 && e <= exponents[i - 1]!)))
    throw new FormatError(line, 1, `ascending exponents from 0 to ${n}`, JSON.stringify(text.slice(0, 40)));
  const g = polynomialOf(exponents);
  const hex = lines.value('hexadecimal');
  const same = polynomialFromHex(hex.text);
  if (!same || !equalPolynomials(g, same))
    throw new FormatError(hex.line, 1, 'the number of the exponents above', JSON.stringify(hex.text.slice(0, 40)));
  if (lines.number('degree', 0) !== degreeOf(g) || lines.number('k', 0) !== n - degreeOf(g))
    throw new FormatError(line, 1, 'exponents that fit the degree and k stated', `degree ${degreeOf(g)}`);
  if (degreeOf(dividePolynomials(xToTheNMinusOne(n), g).remainder) >= 0)
    throw new FormatError(line, 1, `a divisor of x^${n} + 1`, 'another polynomial');
  return { n, g };
}
