import { FormatError } from '../errors.ts';

/** A small file as text. @throws FormatError at the first NUL byte, which no text holds. */
export function decodeText(bytes: Uint8Array): string {
  const at = bytes.indexOf(0);
  if (at >= 0) {
    const before = new TextDecoder().decode(bytes.subarray(0, at)).split(/\r\n|\n|\r/);
    throw new FormatError(before.length, before.at(-1)!.length + 1, 'text', 'a NUL byte');
  }
  return new TextDecoder().decode(bytes);
}
