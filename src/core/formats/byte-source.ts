/** A file that is read piece by piece where it lies, so that it need not be in memory as a whole. */
export interface ByteSource {
  /** Bytes in all. */
  readonly size: number;
  /** Fills `into` from `position` on and gives the number of bytes filled, 0 at the end. Synchronous, as workers can. */
  read(position: number, into: Uint8Array): number;
}

export type FileBytes = Uint8Array | ByteSource;

export const sizeOf = (file: FileBytes): number => (file instanceof Uint8Array ? file.length : file.size);

/** All bytes of a file at once, for formats whose parts point at one another. */
export function allBytes(file: FileBytes): Uint8Array {
  return file instanceof Uint8Array ? file : bytesFrom(file, 0, file.size);
}

/** Up to `count` bytes from a place. */
export function bytesFrom(file: FileBytes, position: number, count: number): Uint8Array {
  if (file instanceof Uint8Array) return file.subarray(position, position + count);
  const bytes = new Uint8Array(Math.min(count, Math.max(0, file.size - position)));
  let filled = 0;
  while (filled < bytes.length) {
    const got = file.read(position + filled, bytes.subarray(filled));
    if (got === 0) break;
    filled += got;
  }
  return bytes.subarray(0, filled);
}
