/** Bytes from … to, both included, as HTTP counts them. */
export interface ByteRange {
  from: number;
  to: number;
}

/** Where files lie. A file's key is the SHA-256 of its bytes, so that a file never changes and storing it twice is
 *  harmless. */
export interface FileStorage {
  /** Resolves when the bytes are safe. @throws Refusal `storage` when they cannot be stored. */
  put(sha256: string, bytes: Uint8Array): Promise<void>;
  /** The bytes, or a part of them; undefined when there is no such file. */
  open(sha256: string, range?: ByteRange): Promise<ReadableStream<Uint8Array> | undefined>;
}

/** Where a key lies under whatever root: a hundred thousand files would be too many for one folder. */
export const pathOf = (sha256: string): string => {
  if (!/^[0-9a-f]{64}$/.test(sha256)) throw new Error(`A file's key is 64 hexadecimal digits, not ${sha256}.`);
  return `${sha256.slice(0, 2)}/${sha256}`;
};
