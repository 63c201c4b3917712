import { degreeOf, exponentsOf, type Gf2Polynomial, polynomialOf } from '../../algebra/gf2-polynomial.ts';
import { ParamError } from '../../errors.ts';
import { circulantBlockSize } from '../../formats/quasi-cyclic.ts';
import { nullSpace, reducedEchelon } from '../../gf2/echelon.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { cyclicGenerator } from './generator-polynomial.ts';

/** A quasi-cyclic code by rows of polynomials modulo x^z + 1. Row r stands for the words of its first `shifts` shifts,
 *  each block moved right by one at once; over all rows these are a basis of the code. */
export interface CirculantGenerator {
  /** Block size. */
  z: number;
  /** Blocks a word; n is z times as many. */
  blockCount: number;
  rows: { shifts: number; polynomials: Gf2Polynomial[] }[];
}

/** The reduced Gröbner basis of the code as a module over GF(2)[x] (Lally and Fitzpatrick 2001, §2): row r is zero
 *  before its pivot block, where it holds a divisor of x^z + 1; later blocks are reduced by the rows below. It exists
 *  for every quasi-cyclic code, whatever the rank of its matrix. Found by elimination: in the reduced echelon form of a
 *  generator matrix whose columns are read block by block from the highest power down, the last row that leads in a
 *  block is the row of least degree there.
 *  @throws ParamError when the matrix is not made of circulant blocks. */
export function circulantGenerator(H: SparseMatrix): CirculantGenerator {
  const z = circulantBlockSize(H);
  if (z === null) throw new ParamError('form', 'circulants', 'a matrix made of circulant blocks larger than 1 × 1');
  const blockCount = H.cols / z;
  if (blockCount === 1) {
    const g = cyclicGenerator(H)!;
    const shifts = z - degreeOf(g);
    return { z, blockCount, rows: shifts > 0 ? [{ shifts, polynomials: [g] }] : [] };
  }
  // Pivots of H taken in the opposite order leave free exactly the columns in which the generator's rows lead.
  const backwards = Uint32Array.from({ length: H.cols }, (_, i) => H.cols - z * Math.floor(i / z) - z + (i % z));
  const { basis, free } = nullSpace(reducedEchelon(H, backwards));
  const rows: CirculantGenerator['rows'] = [];
  for (let block = 0; block < blockCount; block++) {
    const leading = Array.from(free.keys()).filter((r) => Math.floor(free[r]! / z) === block);
    const least = leading[0];
    if (least === undefined) continue;
    const bits = Array.from({ length: H.cols }, (_, c) => basis.get(least, c));
    const polynomials = Array.from({ length: blockCount }, (_, b) => {
      const ones = bits.slice(b * z, (b + 1) * z).flatMap((bit, i) => (bit ? [i] : []));
      return polynomialOf(ones);
    });
    rows.push({ shifts: leading.length, polynomials });
  }
  return { z, blockCount, rows };
}

/** The words of the basis, one byte 0 or 1 a bit. */
export function* circulantWords({ z, blockCount, rows }: CirculantGenerator): Generator<Uint8Array> {
  for (const { shifts, polynomials } of rows) {
    const exponents = polynomials.map(exponentsOf);
    for (let s = 0; s < shifts; s++) {
      const word = new Uint8Array(z * blockCount);
      exponents.forEach((list, b) => {
        for (const e of list) word[b * z + ((e + s) % z)] = 1;
      });
      yield word;
    }
  }
}
