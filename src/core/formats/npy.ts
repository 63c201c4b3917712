import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, LimitError } from '../errors.ts';
import { type FileBytes, sizeOf } from './byte-source.ts';
import { type ByteStream, fileStream, readFully } from './byte-stream.ts';
import { matrixFromEntries } from './matrix-from-entries.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { isNumberKind, NumberStream } from './number-stream.ts';

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

/** What stands before the elements of an array. */
export interface NpyHead {
  shape: number[];
  descr: string;
  fortranOrder: boolean;
}

/** Bytes that the header may have; the arrays read here say little. */
const LONGEST_HEADER = 1 << 16;

/** Reads magic, version and header, and leaves the stream at the first element.
 *  @throws FormatError on anything that is not a version 1 to 3 .npy file. */
export function readNpyHead(stream: ByteStream, name = 'the file'): NpyHead {
  const wrong = (expected: string, found: string) => new FormatError(1, 1, `${name}: ${expected}`, found);
  const begun = readFully(stream, 8);
  if (begun[0] !== 0x93 || String.fromCharCode(...begun.subarray(1, 6)) !== 'NUMPY')
    throw wrong('the magic bytes of a .npy file', begun.length === 0 ? 'an empty file' : 'other bytes');
  const lengthBytes = readFully(stream, begun[6]! >= 2 ? 4 : 2);
  const length = lengthBytes.reduceRight((sum, byte) => 256 * sum + byte, 0);
  if (length > LONGEST_HEADER) throw new LimitError(`header of ${name}`, length, LONGEST_HEADER, 'bytes');
  const bytes = readFully(stream, length);
  if (bytes.length < length || length === 0) throw wrong('a whole header', 'the end of the file');
  const header = new TextDecoder().decode(bytes);
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
  return { shape: sizes, descr, fortranOrder: order === 'True' };
}

/** The elements that follow a header, in the order of the file.
 *  @throws FormatError on a type other than little-endian numbers and booleans. */
export function npyNumbers(stream: ByteStream, { descr }: NpyHead, name = 'the file'): NumberStream {
  const kind = descr.slice(1) === 'b1' ? 'u1' : descr.slice(1);
  if (!/^[<|]/.test(descr) || !isNumberKind(kind))
    throw new FormatError(1, 1, `${name}: little-endian numbers or booleans`, `type ${descr}`);
  return new NumberStream(stream, kind);
}

export const npyCount = ({ shape }: NpyHead): number => shape.reduce((product, size) => product * size, 1);

/** The matrix as a dense array of bytes 0 and 1, row by row. @throws LimitError when it has more than 2^28 cells. */
export function writeNpy(H: SparseMatrix): Uint8Array {
  refuseDense(H.rows, H.cols);
  const data = new Uint8Array(H.rows * H.cols);
  for (let i = 0; i < H.rows; i++) {
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) data[i * H.cols + H.colIndex[e]!] = 1;
  }
  return encodeNpy({ shape: [H.rows, H.cols], descr: '|u1', fortranOrder: false, data });
}

/** Reads a two-dimensional array of zeros and ones of any number type, in either order, where it lies.
 *  @throws FormatError naming the cell that is neither; LimitError on size. */
export function readNpy(file: FileBytes): SparseMatrix {
  const open = () => fileStream(file, 0, sizeOf(file));
  const head = readNpyHead(open());
  const [rows, cols] = head.shape;
  if (head.shape.length !== 2 || !rows || !cols)
    throw new FormatError(1, 1, 'an array with two dimensions, both at least 1', `shape (${head.shape.join(', ')})`);
  refuseDense(rows, cols);
  const lines = head.fortranOrder ? cols : rows;
  const cells = head.fortranOrder ? rows : cols;
  const each = (visit: (row: number, col: number) => void) => {
    const stream = open();
    readNpyHead(stream);
    const numbers = npyNumbers(stream, head);
    for (let line = 0; line < lines; line++) {
      for (let cell = 0; cell < cells; cell++) {
        const value = numbers.next();
        if (value === 0) continue;
        const [row, col] = head.fortranOrder ? [cell, line] : [line, cell];
        if (value !== 1) throw notACell(row, col, value, numbers.given, rows * cols);
        visit(row, col);
      }
    }
  };
  const place = { error: (expected: string, found: string) => new FormatError(1, 1, expected, found) };
  return matrixFromEntries(rows, cols, { each }, place);
}

function notACell(row: number, col: number, value: number, given: number, cells: number): FormatError {
  if (Number.isNaN(value) && given < cells)
    return new FormatError(1, 1, `${cells} elements`, `the end of the file after ${given}`);
  return new FormatError(row + 1, col + 1, 'a cell that is 0 or 1', String(value));
}

function refuseDense(rows: number, cols: number): void {
  refuseBeyondLimits(rows, cols, 0);
  if (rows * cols > maxDenseCells) throw new LimitError('dense matrix', rows * cols, maxDenseCells, 'cells');
}
