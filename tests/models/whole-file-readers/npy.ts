import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';
import { maxDenseCells } from '@/core/formats/npy.ts';

/** An array as NumPy's .npy holds it (format 1.0): shape, element type, and the bytes of its elements. */
export interface NpyArray {
  shape: number[];
  descr: string;
  fortranOrder: boolean;
  data: Uint8Array;
}

/** @throws FormatError on anything that is not a version 1 to 3 .npy file. */
export function decodeNpy(bytes: Uint8Array, name = 'the file'): NpyArray {
  const wrong = (expected: string, found: string) => new FormatError(1, 1, `${name}: ${expected}`, found);
  if (bytes.length < 12 || bytes[0] !== 0x93 || String.fromCharCode(...bytes.subarray(1, 6)) !== 'NUMPY')
    throw wrong('the magic bytes of a .npy file', bytes.length === 0 ? 'an empty file' : 'other bytes');
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const longHeader = bytes[6]! >= 2;
  const from = longHeader ? 12 : 10;
  const to = from + (longHeader ? view.getUint32(8, true) : view.getUint16(8, true));
  if (to > bytes.length) throw wrong('a whole header', 'the end of the file');
  const header = new TextDecoder().decode(bytes.subarray(from, to));
  const descr = /'descr'\s*:\s*'([^']{1,8})'/.exec(header)?.[1];
  const order = /'fortran_order'\s*:\s*(True|False)/.exec(header)?.[1];
  const shape = /'shape'\s*:\s*\(([\d,\sL]*)\)/.exec(header)?.[1];
  if (descr === undefined || order === undefined || shape === undefined)
    throw wrong("a header with 'descr', 'fortran_order' and 'shape'", JSON.stringify(header.slice(0, 40)));
  const sizes = shape
    .split(',')
    .map((part) => part.trim())
    .filter((part) => part !== '')
    .map((part) => Number.parseInt(part, 10));
  return { shape: sizes, descr, fortranOrder: order === 'True', data: bytes.subarray(to) };
}

const readers: Record<string, { size: number; get(view: DataView, at: number): number }> = {
  b1: { size: 1, get: (v, at) => v.getUint8(at) },
  u1: { size: 1, get: (v, at) => v.getUint8(at) },
  i1: { size: 1, get: (v, at) => v.getInt8(at) },
  u2: { size: 2, get: (v, at) => v.getUint16(at, true) },
  i2: { size: 2, get: (v, at) => v.getInt16(at, true) },
  u4: { size: 4, get: (v, at) => v.getUint32(at, true) },
  i4: { size: 4, get: (v, at) => v.getInt32(at, true) },
  u8: { size: 8, get: (v, at) => Number(v.getBigUint64(at, true)) },
  i8: { size: 8, get: (v, at) => Number(v.getBigInt64(at, true)) },
  f4: { size: 4, get: (v, at) => v.getFloat32(at, true) },
  f8: { size: 8, get: (v, at) => v.getFloat64(at, true) },
};

/** Reads element i of an array. @throws FormatError on a type other than little-endian numbers and booleans, or when the
 *  data is shorter than the shape says. */
export function npyElements(array: NpyArray, name = 'the file'): { count: number; at(i: number): number } {
  const reader = /^[<|]/.test(array.descr) ? readers[array.descr.slice(1)] : undefined;
  if (!reader) throw new FormatError(1, 1, `${name}: little-endian numbers or booleans`, `type ${array.descr}`);
  const count = array.shape.reduce((product, size) => product * size, 1);
  if (array.data.length < count * reader.size)
    throw new FormatError(1, 1, `${name}: ${count * reader.size} bytes of data`, `${array.data.length} bytes`);
  const view = new DataView(array.data.buffer, array.data.byteOffset, array.data.length);
  return { count, at: (i) => reader.get(view, i * reader.size) };
}

/** Reads, with all of it in memory, a two-dimensional array of zeros and ones of any number type, in either order.
 *  @throws FormatError naming the cell that is neither; LimitError on size. */
export function wholeNpy(bytes: Uint8Array): SparseMatrix {
  const array = decodeNpy(bytes);
  const [rows, cols] = array.shape;
  if (array.shape.length !== 2 || !rows || !cols)
    throw new FormatError(1, 1, 'an array with two dimensions, both at least 1', `shape (${array.shape.join(', ')})`);
  refuseDense(rows, cols);
  const elements = npyElements(array);
  const rowStart = new Uint32Array(rows + 1);
  const colIndex: number[] = [];
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++) {
      const value = elements.at(array.fortranOrder ? j * rows + i : i * cols + j);
      if (value === 1) colIndex.push(j);
      else if (value !== 0) throw new FormatError(i + 1, j + 1, 'a cell that is 0 or 1', String(value));
    }
    rowStart[i + 1] = colIndex.length;
  }
  refuseBeyondLimits(rows, cols, colIndex.length);
  return { rows, cols, rowStart, colIndex: Uint32Array.from(colIndex) };
}

function refuseDense(rows: number, cols: number): void {
  refuseBeyondLimits(rows, cols, 0);
  if (rows * cols > maxDenseCells) throw new LimitError('dense matrix', rows * cols, maxDenseCells, 'cells');
}
