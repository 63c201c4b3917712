import { type ByteStream, fillFrom } from './byte-stream.ts';

const BATCH = 1 << 13;

type Elements =
  | Uint8Array
  | Int8Array
  | Uint16Array
  | Int16Array
  | Uint32Array
  | Int32Array
  | Float32Array
  | Float64Array;

/** How one number is kept, little-endian: the letter of its kind and its bytes. */
const views = {
  u1: (buffer: ArrayBuffer) => new Uint8Array(buffer),
  i1: (buffer: ArrayBuffer) => new Int8Array(buffer),
  u2: (buffer: ArrayBuffer) => new Uint16Array(buffer),
  i2: (buffer: ArrayBuffer) => new Int16Array(buffer),
  u4: (buffer: ArrayBuffer) => new Uint32Array(buffer),
  i4: (buffer: ArrayBuffer) => new Int32Array(buffer),
  u8: (buffer: ArrayBuffer) => new BigUint64Array(buffer),
  i8: (buffer: ArrayBuffer) => new BigInt64Array(buffer),
  f4: (buffer: ArrayBuffer) => new Float32Array(buffer),
  f8: (buffer: ArrayBuffer) => new Float64Array(buffer),
} as const;

export type NumberKind = keyof typeof views;

export const isNumberKind = (text: string): text is NumberKind => Object.hasOwn(views, text);

export const bytesOfKind = (kind: NumberKind): number => Number(kind[1]);

/** Numbers out of a stream of bytes, one after the other. Past the last one it gives NaN, which no check lets pass, and
 *  `given` says how many there were. */
export class NumberStream {
  given = 0;
  private readonly bytes: Uint8Array;
  private readonly elements: Elements | BigUint64Array | BigInt64Array;
  private readonly batch = new Float64Array(BATCH);
  private filled = 0;
  private at = 0;

  constructor(
    private readonly source: ByteStream,
    private readonly kind: NumberKind,
  ) {
    const buffer = new ArrayBuffer(BATCH * bytesOfKind(kind));
    this.bytes = new Uint8Array(buffer);
    this.elements = views[kind](buffer);
  }

  next(): number {
    if (this.at === this.filled && !this.refill()) return Number.NaN;
    return this.batch[this.at++]!;
  }

  private refill(): boolean {
    this.filled = Math.floor(fillFrom(this.source, this.bytes) / bytesOfKind(this.kind));
    this.given += this.filled;
    this.at = 0;
    const { elements, batch, filled } = this;
    if (elements instanceof BigUint64Array || elements instanceof BigInt64Array)
      for (let i = 0; i < filled; i++) batch[i] = Number(elements[i]);
    else batch.set(elements.subarray(0, filled));
    return filled > 0;
  }
}
