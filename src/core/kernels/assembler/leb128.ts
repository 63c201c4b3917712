/** LEB128, the variable-length integers of the WebAssembly binary format (WebAssembly Core Specification 2.0, §5.2.2):
 *  seven bits a byte, lowest first, the top bit set on all but the last. */

/** An unsigned integer below 2^32. */
export function unsignedLeb(value: number): number[] {
  const bytes: number[] = [];
  let rest = value >>> 0;
  do {
    const low = rest & 0x7f;
    rest >>>= 7;
    bytes.push(rest === 0 ? low : low | 0x80);
  } while (rest !== 0);
  return bytes;
}

/** A signed integer of 32 bits; 0xffffffff and −1 are the same constant. */
export function signedLeb(value: number): number[] {
  const bytes: number[] = [];
  let rest = value | 0;
  for (;;) {
    const low = rest & 0x7f;
    rest >>= 7;
    const done = (rest === 0 && (low & 0x40) === 0) || (rest === -1 && (low & 0x40) !== 0);
    bytes.push(done ? low : low | 0x80);
    if (done) return bytes;
  }
}

/** A signed integer of 64 bits. */
export function signedLeb64(value: bigint): number[] {
  const bytes: number[] = [];
  let rest = BigInt.asIntN(64, value);
  for (;;) {
    const low = Number(rest & 0x7fn);
    rest >>= 7n;
    const done = (rest === 0n && (low & 0x40) === 0) || (rest === -1n && (low & 0x40) !== 0);
    bytes.push(done ? low : low | 0x80);
    if (done) return bytes;
  }
}
