import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError } from '../errors.ts';
import { bytesFrom, type FileBytes, sizeOf } from './byte-source.ts';
import { countOf, type MatArray, matArrays, mxSPARSE } from './mat-elements.ts';
import { matrixFromEntries } from './matrix-from-entries.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import type { NumberStream } from './number-stream.ts';

const HEADER_BYTES = 128;

const wrong = (expected: string, found: string) => new FormatError(1, 1, expected, found);

/** Reads the first sparse array of a little-endian level-5 file, compressed or not, where it lies; stored values must be
 *  0 or 1.
 *  @throws FormatError saying what is missing; LimitError on size. */
export function readMat(file: FileBytes): SparseMatrix {
  const size = sizeOf(file);
  if (size < HEADER_BYTES + 8) throw wrong('a level-5 MAT file of at least 136 bytes', `${size} bytes`);
  const [first, second] = bytesFrom(file, HEADER_BYTES - 2, 2);
  if (first !== 0x49 || second !== 0x4d)
    throw wrong('a little-endian level-5 MAT file', 'another byte order or version');
  for (const array of matArrays(file, HEADER_BYTES)) {
    const flags = array.nextPart();
    if (flags && (array.numbers(flags).next() & 255) === mxSPARSE) return sparseFrom(array);
  }
  throw wrong('a sparse array in the file', 'none; save the matrix with sparse(H)');
}

/** Dimensions, name, then compressed columns: row of each entry (ir), column pointers (jc), values (pr). */
function sparseFrom(array: MatArray): SparseMatrix {
  const size = array.nextPart();
  const name = array.nextPart();
  const ir = array.nextPart();
  const jc = array.nextPart();
  if (!size || !name || !ir || !jc) throw wrong('dimensions, ir, jc and pr', `${array.parts.length} parts`);
  const sizes = array.numbers(size);
  const [rows, cols] = [sizes.next(), sizes.next()];
  if (countOf(size) !== 2 || !isSize(rows) || !isSize(cols)) throw wrong('two dimensions from 1', 'others');
  if (countOf(jc) !== cols + 1) throw wrong(`${cols + 1} column pointers`, String(countOf(jc)));
  refuseBeyondLimits(rows, cols, 0);
  const pointers = pointersOf(array.numbersInPassing(jc), cols);
  const stored = pointers[cols]!;
  refuseBeyondLimits(rows, cols, stored);
  const pr = array.nextPart();
  if (!pr) throw wrong('dimensions, ir, jc and pr', `${array.parts.length} parts`);
  const given = Math.min(countOf(ir), countOf(pr));
  if (stored > given) throw wrong(`${stored} stored entries`, String(given));
  const hasZeros = checkValues(array.numbersInPassing(pr), stored);
  // What comes behind is not used, but a file that breaks off in it is no whole file.
  while (array.nextPart());
  const each = (visit: (row: number, col: number) => void) => {
    const rowOf = array.numbers(ir);
    const values = hasZeros ? array.numbers(pr) : undefined;
    for (let c = 0; c < cols; c++) {
      for (let e = pointers[c]!; e < pointers[c + 1]!; e++) {
        const row = rowOf.next();
        if (!(Number.isInteger(row) && row >= 0 && row < rows)) throw wrong(`rows from 0 to ${rows - 1}`, String(row));
        if (values?.next() !== 0) visit(row, c);
      }
    }
  };
  return matrixFromEntries(rows, cols, { each }, { error: wrong });
}

/** Whether zeros are stored among the ones. */
function checkValues(values: NumberStream, stored: number): boolean {
  let hasZeros = false;
  for (let e = 0; e < stored; e++) {
    const value = values.next();
    if (value !== 0 && value !== 1) throw wrong('stored values 0 or 1', String(value));
    if (value === 0) hasZeros = true;
  }
  return hasZeros;
}

const isSize = (value: number) => Number.isInteger(value) && value >= 1;

function pointersOf(numbers: NumberStream, cols: number): Uint32Array {
  const pointers = new Uint32Array(cols + 1);
  for (let c = 0; c <= cols; c++) {
    const pointer = numbers.next();
    if (!Number.isInteger(pointer) || pointer < (c === 0 ? 0 : pointers[c - 1]!) || pointer >= 2 ** 32)
      throw wrong('whole column pointers that never fall', `others at column ${c}`);
    if (c === 0 && pointer !== 0) throw wrong('column pointers from 0', String(pointer));
    pointers[c] = pointer;
  }
  return pointers;
}
