import { degreeOf } from '../algebra/gf2-polynomial.ts';
import { type CirculantGenerator, circulantGenerator } from '../codes/encode/circulant-generator.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, LimitError } from '../errors.ts';
import { polynomialFromHex, polynomialToHex } from './hexadecimal.ts';
import { linesOf } from './keyed-lines.ts';
import { matrixLimits, refuseBeyondLimits } from './matrix-limits.ts';

/** The generator of a quasi-cyclic code as rows of circulants, one row a line.
 *  @throws ParamError when the matrix is not made of circulant blocks. */
export function writeGeneratorCirculants(H: SparseMatrix): Uint8Array {
  const { z, blockCount, rows } = circulantGenerator(H);
  const k = rows.reduce((sum, row) => sum + row.shifts, 0);
  const width = Math.ceil(z / 4);
  const lines = rows.map(
    ({ shifts, polynomials }) => `${shifts}: ${polynomials.map((f) => polynomialToHex(f, width)).join(' ')}`,
  );
  const text = `# generator of the quasi-cyclic code { c : H c = 0 } by rows of circulants
# bit b z + e of a word is the coefficient of x^e in block b; bit e of a hexadecimal number is the coefficient of x^e
# a row stands for its shifts 0 to s-1, where one shift multiplies every block by x modulo x^z + 1; s is before the colon
# together these words are a basis of the code: k is the sum of all s
z=${z}
block-columns=${blockCount}
k=${k}
${lines.join('\n')}${lines.length > 0 ? '\n' : ''}`;
  return new TextEncoder().encode(text);
}

/** @throws FormatError with line and column; LimitError on size. */
export function readGeneratorCirculants(bytes: Uint8Array): CirculantGenerator {
  const lines = linesOf(bytes);
  const z = lines.number('z', 1);
  const blockCount = lines.number('block-columns', 1);
  refuseBeyondLimits(lines.rest.length, z * blockCount, 0);
  if (lines.rest.length * z * blockCount > 32 * matrixLimits.ones)
    throw new LimitError('generator', lines.rest.length * z * blockCount, 32 * matrixLimits.ones, 'bits');
  const rows = lines.rest.map(({ text, line }) => {
    const [, count, cells] = /^(\d{1,9}):\s*(.+)$/.exec(text) ?? [];
    const numbers = cells?.split(/\s+/) ?? [];
    if (!count || Number(count) < 1 || Number(count) > z || numbers.length !== blockCount)
      throw new FormatError(line, 1, `"shifts: " and ${blockCount} numbers`, JSON.stringify(text.slice(0, 40)));
    const polynomials = numbers.map((hex, b) => {
      const f = polynomialFromHex(hex);
      if (!f || degreeOf(f) >= z)
        throw new FormatError(line, 1, `a polynomial below x^${z} in block ${b}`, JSON.stringify(hex.slice(0, 40)));
      return f;
    });
    return { shifts: Number(count), polynomials };
  });
  const k = rows.reduce((sum, row) => sum + row.shifts, 0);
  if (lines.number('k', 0) !== k)
    throw new FormatError(lines.value('k').line, 3, `${k}, the sum of the shifts`, lines.value('k').text);
  return { z, blockCount, rows };
}
