import { FormatError, LimitError } from '../errors.ts';
import { bytesFrom, type FileBytes, sizeOf } from './byte-source.ts';
import { type ByteStream, fileStream, skipByReading } from './byte-stream.ts';
import { Crc32 } from './crc32.ts';
import { InflatedStream } from './inflated-stream.ts';

/** Bytes that an archive's directory may take: a few members have a few hundred. */
const MOST_DIRECTORY_BYTES = 1 << 20;
const END_BYTES = 22;
const LONGEST_COMMENT = 0xffff;
const UNSAID = 0xffffffff;

export interface ZipMember {
  name: string;
  /** Bytes unpacked. */
  size: number;
  /** From its first byte; as often as wanted. What is read to the end is held against its size and its CRC-32. */
  open(): ByteStream;
}

/** The members of a zip archive that are named here, by the directory at its end (PKWARE's APPNOTE, 4.3; with its
 *  64-bit sizes). Names are only ever compared, never used as paths.
 *  @throws FormatError when it is no such archive; LimitError on a directory or a member too large. */
export function zipMembers(file: FileBytes, names: ReadonlySet<string>, mostBytes: number): Map<string, ZipMember> {
  const directory = directoryOf(file);
  const view = viewOf(directory);
  const members = new Map<string, ZipMember>();
  for (let at = 0; at < directory.length; ) {
    if (at + 46 > directory.length || view.getUint32(at, true) !== 0x02014b50) throw notAnArchive(file);
    const nameLength = view.getUint16(at + 28, true);
    const extraLength = view.getUint16(at + 30, true);
    const name = new TextDecoder().decode(directory.subarray(at + 46, at + 46 + nameLength));
    if (names.has(name)) {
      if (members.has(name)) throw new FormatError(1, 1, `${name} once in the archive`, 'a second one');
      const extra = directory.subarray(at + 46 + nameLength, at + 46 + nameLength + extraLength);
      members.set(name, memberOf(file, name, new DataView(view.buffer, view.byteOffset + at, 46), extra, mostBytes));
    }
    at += 46 + nameLength + extraLength + view.getUint16(at + 32, true);
  }
  return members;
}

const viewOf = (bytes: Uint8Array) => new DataView(bytes.buffer, bytes.byteOffset, bytes.length);

const notAnArchive = (file: FileBytes) =>
  new FormatError(1, 1, 'a zip archive', sizeOf(file) === 0 ? 'an empty file' : 'bytes that do not unpack as one');

/** The directory, found by the record that ends the file, behind which only a comment may stand. */
function directoryOf(file: FileBytes): Uint8Array {
  const from = Math.max(0, sizeOf(file) - END_BYTES - LONGEST_COMMENT);
  const tail = bytesFrom(file, from, END_BYTES + LONGEST_COMMENT);
  const view = viewOf(tail);
  let end = tail.length - END_BYTES;
  while (end >= 0 && view.getUint32(end, true) !== 0x06054b50) end--;
  if (end < 0) throw notAnArchive(file);
  let size = view.getUint32(end + 12, true);
  let start = view.getUint32(end + 16, true);
  const locator = end - 20;
  if ((size === UNSAID || start === UNSAID) && locator >= 0 && view.getUint32(locator, true) === 0x07064b50) {
    const record = bytesFrom(file, Number(view.getBigUint64(locator + 8, true)), 56);
    const wide = viewOf(record);
    if (record.length < 56 || wide.getUint32(0, true) !== 0x06064b50) throw notAnArchive(file);
    size = Number(wide.getBigUint64(40, true));
    start = Number(wide.getBigUint64(48, true));
  }
  if (size > MOST_DIRECTORY_BYTES) throw new LimitError('archive directory', size, MOST_DIRECTORY_BYTES, 'bytes');
  const directory = bytesFrom(file, start, size);
  if (directory.length < size) throw notAnArchive(file);
  return directory;
}

function memberOf(file: FileBytes, name: string, entry: DataView, extra: Uint8Array, mostBytes: number): ZipMember {
  const wide = wideSizes(extra);
  const said = (at: number) => {
    const value = entry.getUint32(at, true);
    return value === UNSAID ? (wide.shift() ?? value) : value;
  };
  // In the order in which the 64-bit sizes stand.
  const size = said(24);
  const packed = said(20);
  const header = said(42);
  const method = entry.getUint16(10, true);
  if (size > mostBytes) throw new LimitError(`member ${name}`, size, mostBytes, 'bytes');
  if ((entry.getUint16(8, true) & 1) !== 0 || (method !== 0 && method !== 8))
    throw new FormatError(1, 1, `member ${name} stored or deflated`, 'one that is encrypted or packed otherwise');
  const local = bytesFrom(file, header, 30);
  const view = viewOf(local);
  if (local.length < 30 || view.getUint32(0, true) !== 0x04034b50) throw notAnArchive(file);
  const from = header + 30 + view.getUint16(26, true) + view.getUint16(28, true);
  if (from + packed > sizeOf(file)) throw new FormatError(1, 1, `the whole of ${name}`, 'the end of the file');
  const crc = entry.getUint32(16, true);
  return {
    name,
    size,
    open() {
      const bytes = fileStream(file, from, from + packed);
      return new CheckedStream(
        method === 0 ? bytes : new InflatedStream(bytes, 'raw', () => notAnArchive(file)),
        name,
        size,
        crc,
      );
    },
  };
}

/** The sizes that did not fit into 32 bits, in their order. */
function wideSizes(extra: Uint8Array): number[] {
  const view = viewOf(extra);
  for (let at = 0; at + 4 <= extra.length; at += 4 + view.getUint16(at + 2, true)) {
    if (view.getUint16(at, true) !== 1) continue;
    const count = Math.min(3, Math.floor(Math.min(view.getUint16(at + 2, true), extra.length - at - 4) / 8));
    return Array.from({ length: count }, (_, i) => Number(view.getBigUint64(at + 4 + 8 * i, true)));
  }
  return [];
}

/** A member on its way out, held against what the directory says of it. */
class CheckedStream implements ByteStream {
  private readonly crc = new Crc32();
  private passed = 0;

  constructor(
    private readonly source: ByteStream,
    private readonly name: string,
    private readonly size: number,
    private readonly saidCrc: number,
  ) {}

  read(into: Uint8Array): number {
    if (into.length === 0) return 0;
    const got = this.source.read(into);
    this.passed += got;
    this.crc.add(into.subarray(0, got));
    if (this.passed > this.size || (got === 0 && this.passed < this.size))
      throw new FormatError(1, 1, `${this.size} bytes in ${this.name}`, got === 0 ? String(this.passed) : 'more');
    if (got === 0 && this.crc.value !== this.saidCrc)
      throw new FormatError(1, 1, `${this.name} as its CRC-32 says`, 'bytes that were altered');
    return got;
  }

  skip(count: number): number {
    return skipByReading(this, count);
  }
}
