import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, LimitError } from '../errors.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';

/** Cells that a dense file may have: 2^28, one byte each. */
export const maxDenseCells = 2 ** 28;

/** An array as NumPy's .npy holds it (format 1.0): shape, element type, and the bytes of its elements. */
export interface NpyArray {
  shape: number[];
  descr: string;
  fortranOrder: boolean;
  data: Uint8Array;
}

/** Magic, version, little-endian header length, a Python dict literal padded with blanks to 64 bytes, data. */
export function encodeNpy(array: NpyArray): Uint8Array {
  const shape = array.shape.length === 1 ? `(${array.shape[0]},)` : `(${array.shape.join(', ')})`;
  const dict = `{'descr': '${array.descr}', 'fortran_order': ${array.fortranOrder ? 'True' : 'False'}, 'shape': ${shape}, }`;
  const length = Math.ceil((10 + dict.length + 1) / 64) * 64;
  const bytes = new Uint8Array(length + array.data.length);
  bytes.set([0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59, 1, 0, (length - 10) & 255, (length - 10) >> 8]);
  bytes.set(new TextEncoder().encode(`${dict.padEnd(length - 11)}\n`), 10);
  bytes.set(array.data, length);
  return bytes;
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

/** The matrix as a dense array of bytes 0 and 1, row by row. @throws LimitError when it has more than 2^28 cells. */
export function writeNpy(H: SparseMatrix): Uint8Array {
  refuseDense(H.rows, H.cols);
  const data = new Uint8Array(H.rows * H.cols);
  for (let i = 0; i < H.rows; i++) {
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) data[i * H.cols + H.colIndex[e]!] = 1;
  }
  return encodeNpy({ shape: [H.rows, H.cols], descr: '|u1', fortranOrder: false, data });
}

/** Reads a two-dimensional array of zeros and ones of any number type, in either order.
 *  @throws FormatError naming the cell that is neither; LimitError on size. */
export function readNpy(bytes: Uint8Array): SparseMatrix {
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
