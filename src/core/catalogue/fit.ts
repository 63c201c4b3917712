import type { Enclosure } from '../evidence.ts';
import type { CatalogueColumns } from './columns.ts';
import type { CatalogueQuery } from './query.ts';

/** What shortening to a payload, a length, or both makes of each row: its length and dimension, and the bits it drops. Bits
 *  are taken from an information set, so the rank stays as it is. Ends that no code can have are cut off. */
export class Fit {
  readonly isAsked: boolean;
  /** The exact length asked for: in so many words, or as payload and parity together. */
  readonly lengthAsked: number | undefined;
  private readonly payloadBits: number | undefined;
  private readonly n: Int32Array;
  private readonly rankLower: Int32Array;
  private readonly rankUpper: Int32Array;

  constructor(
    columns: CatalogueColumns,
    { payloadBits, parityBits, shortenTo }: Pick<CatalogueQuery, 'payloadBits' | 'parityBits' | 'shortenTo'>,
  ) {
    this.isAsked = payloadBits !== undefined || shortenTo !== undefined;
    this.payloadBits = payloadBits;
    const together = payloadBits !== undefined && parityBits !== undefined ? payloadBits + parityBits : undefined;
    this.lengthAsked = shortenTo ?? together;
    this.n = columns.column('n');
    this.rankLower = columns.column('rankLower');
    this.rankUpper = columns.column('rankUpper');
  }

  length(row: number): Enclosure {
    return { lower: this.shortestLength(row), upper: this.longestLength(row) };
  }

  shortestLength(row: number): number {
    const { payloadBits, lengthAsked } = this;
    if (lengthAsked !== undefined) return lengthAsked;
    return payloadBits === undefined ? this.n[row]! : Math.min(this.n[row]!, payloadBits + this.rankLower[row]!);
  }

  longestLength(row: number): number {
    const { payloadBits, lengthAsked } = this;
    if (lengthAsked !== undefined) return lengthAsked;
    return payloadBits === undefined ? this.n[row]! : Math.min(this.n[row]!, payloadBits + this.rankUpper[row]!);
  }

  leastDimension(row: number): number {
    const { payloadBits, lengthAsked } = this;
    return payloadBits ?? Math.max(0, (lengthAsked ?? this.n[row]!) - this.rankUpper[row]!);
  }

  mostDimension(row: number): number {
    const { payloadBits, lengthAsked } = this;
    return payloadBits ?? Math.max(0, (lengthAsked ?? this.n[row]!) - this.rankLower[row]!);
  }

  /** Bits dropped. */
  shortening(row: number): Enclosure {
    const lower = this.n[row]! - this.longestLength(row);
    const upper = this.n[row]! - this.shortestLength(row);
    return { lower: Math.max(0, lower), upper: Math.max(0, upper) };
  }

  /** Bits dropped when the formulas settle how many, else undefined: the rank must be computed first. */
  settledShortening(row: number): number | undefined {
    const { lower, upper } = this.shortening(row);
    const { payloadBits, lengthAsked } = this;
    if (payloadBits !== undefined && this.rankLower[row] !== this.rankUpper[row]) return undefined;
    if (lengthAsked !== undefined && lengthAsked <= this.rankUpper[row]!) return undefined;
    return lower === upper ? lower : undefined;
  }
}
