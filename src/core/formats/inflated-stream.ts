import { Inflate, Unzlib } from 'fflate';
import { type ByteStream, skipByReading } from './byte-stream.ts';

/** Packed bytes taken at once, at least and at most: fewer after a piece that unpacked to more than the second bound, since
 *  they may unpack a thousandfold, and each piece costs a copy of the last 32 KB. */
const LEAST_PIECE = 1 << 9;
const MOST_PIECE = 1 << 14;
const MOST_AT_ONCE = 1 << 18;

/** What a packed stream unpacks to, piece by piece as it is asked for: no more is in memory than one piece gives.
 *  `wrong` makes the error of bytes that do not unpack, or that end too soon. */
export class InflatedStream implements ByteStream {
  private readonly packed = new Uint8Array(MOST_PIECE);
  private readonly inflate: Inflate | Unzlib;
  private ready: Uint8Array[] = [];
  private isOver = false;
  private pieceBytes = LEAST_PIECE;

  constructor(
    private readonly source: ByteStream,
    kind: 'raw' | 'zlib',
    private readonly wrong: () => Error,
  ) {
    const take = (piece: Uint8Array) => {
      if (piece.length > 0) this.ready.push(piece);
    };
    this.inflate = kind === 'raw' ? new Inflate(take) : new Unzlib(take);
  }

  read(into: Uint8Array): number {
    while (this.ready.length === 0 && !this.isOver) this.unpackMore();
    const piece = this.ready[0];
    if (!piece || into.length === 0) return 0;
    const part = piece.subarray(0, into.length);
    into.set(part);
    if (part.length === piece.length) this.ready.shift();
    else this.ready[0] = piece.subarray(part.length);
    return part.length;
  }

  skip(count: number): number {
    return skipByReading(this, count);
  }

  private unpackMore(): void {
    const got = this.source.read(this.packed.subarray(0, this.pieceBytes));
    this.isOver = got === 0;
    try {
      // A short piece is copied, since the unpacker waits with it until the header is whole.
      const piece = this.packed.subarray(0, got);
      this.inflate.push(got < LEAST_PIECE ? piece.slice() : piece, this.isOver);
    } catch {
      throw this.wrong();
    }
    const unpacked = this.ready.reduce((sum, piece) => sum + piece.length, 0);
    this.pieceBytes = unpacked > MOST_AT_ONCE ? LEAST_PIECE : Math.min(MOST_PIECE, 2 * this.pieceBytes);
  }
}
