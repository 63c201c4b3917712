/** CRC-32 of the zip format (PKWARE's APPNOTE, 4.4.7): the reflected polynomial 0xEDB88320, begun and ended inverted. */
export class Crc32 {
  private register = 0xffffffff;

  add(bytes: Uint8Array): void {
    let register = this.register;
    for (let i = 0; i < bytes.length; i++) register = (register >>> 8) ^ table[(register ^ bytes[i]!) & 255]!;
    this.register = register;
  }

  get value(): number {
    return (this.register ^ 0xffffffff) >>> 0;
  }
}

const table = Uint32Array.from({ length: 256 }, (_, byte) => {
  let register = byte;
  for (let bit = 0; bit < 8; bit++) register = register & 1 ? (register >>> 1) ^ 0xedb88320 : register >>> 1;
  return register;
});
