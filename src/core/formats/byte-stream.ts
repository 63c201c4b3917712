import { bytesFrom, type FileBytes } from './byte-source.ts';

/** Bytes that come one after the other. */
export interface ByteStream {
  /** Fills `into` as far as bytes come at once and gives their number, 0 only at the end. */
  read(into: Uint8Array): number;
  /** Passes over so many bytes, or all that are left, and gives their number. */
  skip(count: number): number;
}

/** The bytes of a file from one place to another. */
export function fileStream(file: FileBytes, from: number, to: number): ByteStream {
  let at = from;
  return {
    read(into) {
      const wanted = into.subarray(0, Math.max(0, Math.min(into.length, to - at)));
      const got = wanted.length === 0 ? 0 : fill(file, at, wanted);
      at += got;
      return got;
    },
    skip(count) {
      const skipped = Math.max(0, Math.min(count, to - at));
      at += skipped;
      return skipped;
    },
  };
}

function fill(file: FileBytes, at: number, into: Uint8Array): number {
  if (!(file instanceof Uint8Array)) return file.read(at, into);
  const part = bytesFrom(file, at, into.length);
  into.set(part);
  return part.length;
}

const SKIPPED_PIECE = 1 << 16;

/** Passes over bytes by reading them, for streams that have no other way. */
export function skipByReading(stream: Pick<ByteStream, 'read'>, count: number): number {
  const into = new Uint8Array(Math.min(count, SKIPPED_PIECE));
  let skipped = 0;
  while (skipped < count) {
    const got = stream.read(into.subarray(0, Math.min(count - skipped, into.length)));
    if (got === 0) break;
    skipped += got;
  }
  return skipped;
}

/** Up to `count` bytes, fewer only at the end. */
export function readFully(stream: ByteStream, count: number): Uint8Array {
  const bytes = new Uint8Array(count);
  return bytes.subarray(0, fillFrom(stream, bytes));
}

/** Fills all of `into` unless the stream ends, and gives the number filled. */
export function fillFrom(stream: ByteStream, into: Uint8Array): number {
  let filled = 0;
  while (filled < into.length) {
    const got = stream.read(into.subarray(filled));
    if (got === 0) break;
    filled += got;
  }
  return filled;
}
