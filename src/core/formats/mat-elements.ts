import { FormatError, LimitError } from '../errors.ts';
import { bytesFrom, type FileBytes, sizeOf } from './byte-source.ts';
import { type ByteStream, fileStream, readFully, skipByReading } from './byte-stream.ts';
import { InflatedStream } from './inflated-stream.ts';
import { matrixLimits } from './matrix-limits.ts';
import { type NumberKind, NumberStream } from './number-stream.ts';

/** Element types and the array class used, from the published description of the level-5 MAT file. */
export const miINT8 = 1;
export const miINT32 = 5;
export const miUINT32 = 6;
export const miDOUBLE = 9;
export const miMATRIX = 14;
const miCOMPRESSED = 15;
export const mxSPARSE = 5;

const kinds: Readonly<Record<number, NumberKind>> = {
  1: 'i1',
  2: 'u1',
  3: 'i2',
  4: 'u2',
  5: 'i4',
  6: 'u4',
  7: 'f4',
  9: 'f8',
  12: 'i8',
  13: 'u8',
};
/** What is no matrix but a trap packs a thousandfold; indices and values of a matrix pack ten- to fiftyfold. */
const MOST_PACKED = 200;
const MOST_PART_BYTES = 8 * matrixLimits.ones + 8;

export interface MatPart {
  type: number;
  /** Bytes of its data, and where they begin inside the array. */
  size: number;
  at: number;
  /** Whether its data lie inside its tag. */
  isSmall: boolean;
}

const wrong = (expected: string, found: string) => new FormatError(1, 1, expected, found);

/** One array of the file, compressed or not. Its parts are passed in their order; the numbers of one can be read in passing,
 *  which unpacks nothing twice, or from its place as often as wanted. */
export class MatArray {
  readonly parts: MatPart[] = [];
  private readonly stream: ByteStream;
  private at = 0;

  constructor(
    private readonly open: () => ByteStream,
    private readonly size: number,
  ) {
    const source = open();
    this.stream = watched(source, (bytes) => {
      this.at += bytes;
    });
  }

  /** The next part, passing over what is left of the one before; undefined after the last.
   *  @throws FormatError when it is torn; LimitError when it is larger than a part of a matrix may be. */
  nextPart(): MatPart | undefined {
    const before = this.parts.at(-1);
    if (before) this.moveTo(8 * Math.ceil((before.at + before.size) / 8));
    if (this.at + 8 > this.size) {
      this.moveTo(this.size);
      return undefined;
    }
    const from = this.at;
    const tag = tagOf(readFully(this.stream, 8));
    const part = { ...tag, at: from + (tag.isSmall ? 4 : 8) };
    if (part.at + part.size > this.size) throw wrong(`an element of ${part.size} bytes`, 'fewer');
    if (part.size > MOST_PART_BYTES) throw new LimitError('unpacked array', part.size, MOST_PART_BYTES, 'bytes');
    this.parts.push(part);
    return part;
  }

  /** The numbers of a part; none of a type that holds no numbers. */
  numbers(part: MatPart): NumberStream {
    const stream = this.open();
    stream.skip(part.at);
    return numbersOf(stream, part);
  }

  /** The same of the part just come to, once. */
  numbersInPassing(part: MatPart): NumberStream {
    return part.isSmall ? this.numbers(part) : numbersOf(this.stream, part);
  }

  /** Further in the array, at most to its end. */
  private moveTo(place: number): void {
    const count = Math.min(place, this.size) - this.at;
    if (count > 0 && this.stream.skip(count) < count) throw wrong('the whole of the array', 'the end of the file');
  }
}

function numbersOf(stream: ByteStream, { type, size }: MatPart): NumberStream {
  const kind = kinds[type];
  return new NumberStream(limited(stream, kind ? size : 0), kind ?? 'u1');
}

export const countOf = ({ type, size }: MatPart): number => {
  const kind = kinds[type];
  return kind ? Math.floor(size / Number(kind[1])) : 0;
};

/** The arrays of a file, in its order. Of one that is packed nothing is unpacked but its tag.
 *  @throws FormatError on an element that is torn. */
export function* matArrays(file: FileBytes, from: number): Generator<MatArray> {
  for (let at = from; at + 8 <= sizeOf(file); ) {
    const tag = tagOf(bytesFrom(file, at, 8));
    const data = at + 8;
    const end = tag.isSmall ? data : data + tag.size;
    if (end > sizeOf(file)) throw wrong(`an element of ${tag.size} bytes`, 'the end of the file');
    if (tag.type === miMATRIX) yield new MatArray(() => fileStream(file, data, end), tag.size);
    if (tag.type === miCOMPRESSED) {
      const unpacked = () => limitedInflate(fileStream(file, data, end), tag.size);
      const inner = tagOf(readFully(unpacked(), 8));
      if (inner.type === miMATRIX) yield new MatArray(() => past(unpacked(), 8), inner.size);
    }
    at = tag.type === miCOMPRESSED ? end : data + 8 * Math.ceil((end - data) / 8);
  }
}

/** Type and size; a part of up to four bytes may lie inside its tag, the size then in the upper half of the type. */
function tagOf(bytes: Uint8Array): { type: number; size: number; isSmall: boolean } {
  if (bytes.length < 8) throw wrong('a whole element', 'the end of the file');
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const tag = view.getUint32(0, true);
  const small = tag >>> 16;
  if (small !== 0) return { type: tag & 0xffff, size: Math.min(4, small), isSmall: true };
  return { type: tag, size: view.getUint32(4, true), isSmall: false };
}

function past(stream: ByteStream, count: number): ByteStream {
  stream.skip(count);
  return stream;
}

/** The next `count` bytes of a stream. */
function limited(stream: ByteStream, count: number): ByteStream {
  let left = count;
  return {
    read(into) {
      const got = left === 0 ? 0 : stream.read(into.subarray(0, Math.min(left, into.length)));
      left -= got;
      return got;
    },
    skip(bytes) {
      const skipped = stream.skip(Math.min(bytes, left));
      left -= skipped;
      return skipped;
    },
  };
}

function watched(stream: ByteStream, onPassed: (bytes: number) => void): ByteStream {
  return {
    read(into) {
      const got = stream.read(into);
      onPassed(got);
      return got;
    },
    skip(bytes) {
      const skipped = stream.skip(bytes);
      onPassed(skipped);
      return skipped;
    },
  };
}

/** Lets go of a small file that unpacks to far more than a matrix would. */
function limitedInflate(packed: ByteStream, packedBytes: number): ByteStream {
  const limit = (1 << 20) + MOST_PACKED * packedBytes;
  let passed = 0;
  const inflated = new InflatedStream(packed, 'zlib', () => wrong('a compressed element', 'bytes that do not unpack'));
  const read = (into: Uint8Array) => {
    const got = inflated.read(into);
    passed += got;
    if (passed > limit) throw new LimitError('unpacked array', passed, limit, 'bytes');
    return got;
  };
  return { read, skip: (bytes) => skipByReading({ read }, bytes) };
}
