import { Unzlib } from 'fflate';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { matrixFromEntries } from '@/core/formats/matrix-from-entries.ts';
import { matrixLimits, refuseBeyondLimits } from '@/core/formats/matrix-limits.ts';
import { pairedEntries } from './paired-entries.ts';

/** Element types and the array class used, from the published description of the level-5 MAT file. */
const miINT8 = 1;
const miUINT8 = 2;
const miINT32 = 5;
const miUINT32 = 6;
const miDOUBLE = 9;
const miMATRIX = 14;
const miCOMPRESSED = 15;
const mxSPARSE = 5;
const maxUnpackedBytes = 16 * matrixLimits.ones;

/** Reads, with all of it in memory, the first sparse array of a little-endian level-5 file, compressed or not; stored values must be 0 or 1.
 *  @throws FormatError saying what is missing; LimitError on size. */
export function wholeMat(bytes: Uint8Array): SparseMatrix {
  const wrong = (expected: string, found: string) => new FormatError(1, 1, expected, found);
  if (bytes.length < 136) throw wrong('a level-5 MAT file of at least 136 bytes', `${bytes.length} bytes`);
  if (bytes[126] !== 0x49 || bytes[127] !== 0x4d)
    throw wrong('a little-endian level-5 MAT file', 'another byte order or version');
  for (let rest = bytes.subarray(128); rest.length >= 8; ) {
    const outer = nextElement(rest);
    rest = rest.subarray(outer.next);
    const inner = outer.type === miCOMPRESSED ? nextElement(inflate(outer.data)) : outer;
    if (inner.type !== miMATRIX) continue;
    const parts = elementsOf(inner.data);
    if ((numbersOf(parts[0]).at(0) & 255) === mxSPARSE) return sparseFrom(parts);
  }
  throw wrong('a sparse array in the file', 'none; save the matrix with sparse(H)');
}

function sparseFrom(parts: MatElement[]): SparseMatrix {
  const wrong = (expected: string, found: string) => new FormatError(1, 1, expected, found);
  const [, size, , ir, jc, pr] = parts.map((part) => numbersOf(part));
  if (!size || !ir || !jc || !pr) throw wrong('dimensions, ir, jc and pr', `${parts.length} parts`);
  const [rows, cols] = [size.at(0), size.at(1)];
  if (size.count !== 2 || !(rows >= 1) || !(cols >= 1)) throw wrong('two dimensions from 1', 'others');
  if (jc.count !== cols + 1) throw wrong(`${cols + 1} column pointers`, String(jc.count));
  const stored = jc.at(cols);
  refuseBeyondLimits(rows, cols, stored);
  if (!(stored >= 0 && stored <= ir.count && stored <= pr.count))
    throw wrong(`${stored} stored entries`, String(Math.min(ir.count, pr.count)));
  const rowOf: number[] = [];
  const colOf: number[] = [];
  for (let c = 0; c < cols; c++) {
    if (!Number.isInteger(jc.at(c)) || jc.at(c) < 0 || jc.at(c + 1) < jc.at(c) || jc.at(c + 1) > stored)
      throw wrong('whole column pointers that never fall', `others at column ${c + 1}`);
    for (let e = jc.at(c); e < jc.at(c + 1); e++) {
      const value = pr.at(e);
      if (value !== 0 && value !== 1) throw wrong('stored values 0 or 1', String(value));
      const row = ir.at(e);
      if (!(Number.isInteger(row) && row >= 0 && row < rows)) throw wrong(`rows from 0 to ${rows - 1}`, String(row));
      if (value === 0) continue;
      rowOf.push(row);
      colOf.push(c);
    }
  }
  return matrixFromEntries(rows, cols, pairedEntries(rowOf, colOf), { error: wrong });
}

interface MatElement {
  type: number;
  data: Uint8Array;
  /** Bytes to the next element. */
  next: number;
}

/** Elements of up to four bytes may be packed into their tag, the size in its upper half. */
function nextElement(bytes: Uint8Array): MatElement {
  if (bytes.length < 8) throw new FormatError(1, 1, 'a whole element', 'the end of the file');
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const tag = view.getUint32(0, true);
  const packed = tag >>> 16;
  if (packed !== 0) return { type: tag & 0xffff, data: bytes.subarray(4, 4 + Math.min(4, packed)), next: 8 };
  const size = view.getUint32(4, true);
  if (8 + size > bytes.length) throw new FormatError(1, 1, `an element of ${size} bytes`, 'the end of the file');
  const padded = tag === miCOMPRESSED ? size : Math.ceil(size / 8) * 8;
  return { type: tag, data: bytes.subarray(8, 8 + size), next: 8 + padded };
}

function elementsOf(bytes: Uint8Array): MatElement[] {
  const found: MatElement[] = [];
  for (let rest = bytes; rest.length >= 8; ) {
    const part = nextElement(rest);
    found.push(part);
    rest = rest.subarray(part.next);
  }
  return found;
}

function numbersOf(part: MatElement | undefined): { count: number; at(i: number): number } {
  if (!part) return { count: 0, at: () => Number.NaN };
  const { data } = part;
  const view = new DataView(data.buffer, data.byteOffset, data.length);
  const as = (size: number, get: (at: number) => number) => {
    const count = Math.floor(data.length / size);
    return { count, at: (i: number) => (i < count ? get(i * size) : Number.NaN) };
  };
  switch (part.type) {
    case miINT8:
      return as(1, (at) => view.getInt8(at));
    case miUINT8:
      return as(1, (at) => view.getUint8(at));
    case 3:
      return as(2, (at) => view.getInt16(at, true));
    case 4:
      return as(2, (at) => view.getUint16(at, true));
    case miINT32:
      return as(4, (at) => view.getInt32(at, true));
    case miUINT32:
      return as(4, (at) => view.getUint32(at, true));
    case 7:
      return as(4, (at) => view.getFloat32(at, true));
    case 12:
      return as(8, (at) => Number(view.getBigInt64(at, true)));
    case 13:
      return as(8, (at) => Number(view.getBigUint64(at, true)));
    case miDOUBLE:
      return as(8, (at) => view.getFloat64(at, true));
    default:
      return { count: 0, at: () => Number.NaN };
  }
}

const PACKED_PIECE = 1 << 14;
/** What is no matrix but a trap packs a thousandfold; indices of a matrix pack ten- to fiftyfold. */
const MOST_PACKED = 200;

/** Unpacked piece by piece, so that a small file that unpacks to far more than it may is let go of in time. */
function inflate(data: Uint8Array): Uint8Array {
  const limit = Math.min(maxUnpackedBytes, (1 << 20) + MOST_PACKED * data.length);
  const pieces: Uint8Array[] = [];
  let size = 0;
  const stream = new Unzlib((piece) => {
    size += piece.length;
    if (size > limit) throw new LimitError('unpacked array', size, limit, 'bytes');
    pieces.push(piece);
  });
  try {
    for (let at = 0; at < data.length; at += PACKED_PIECE)
      stream.push(data.subarray(at, at + PACKED_PIECE), at + PACKED_PIECE >= data.length);
    const unpacked = new Uint8Array(size);
    let at = 0;
    for (const piece of pieces) {
      unpacked.set(piece, at);
      at += piece.length;
    }
    return unpacked;
  } catch (error) {
    if (error instanceof LimitError) throw error;
    throw new FormatError(1, 1, 'a compressed element', 'bytes that do not unpack');
  }
}
