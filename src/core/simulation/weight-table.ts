import { ParamError } from '../errors.ts';

/** Cumulative weights of a pattern of independent errors, in units of 2^-64. Entry w is C[w], the floor of
 *  2^64·P(W ≤ w), split in two words. A 64-bit draw u gives the least w with u < C[w]; a u below none of the entries
 *  gives w = hi.length: the last entry, 2^64, is not stored. */
export interface WeightTable {
  hi: Uint32Array;
  lo: Uint32Array;
}

/** Bits kept behind the point, relative to the largest probability. */
const precision = 256n;
const one = 1n << 64n;

/** The table of Binomial(n, p). Terms are worked out from the largest downwards and upwards with 256 bits behind the
 *  point and divided by their sum, so that an entry is wrong, by one unit, only when the exact value is within 2^-180
 *  of a whole number. Above the weight where 2^64·P(W ≤ w) has come within 1 of 2^64 the table stops: heavier
 *  patterns, of probability below 2^-64 together, count as that weight.
 *  @throws ParamError unless 0 < p ≤ 1. */
export function bscWeightTable(n: number, p: number): WeightTable {
  if (!(p > 0 && p <= 1)) throw new ParamError('p', p, 'a probability above 0 and at most 1');
  const terms = binomialTerms(n, p);
  const total = terms.values.reduce((sum, term) => sum + term, 0n);
  const entries: bigint[] = Array.from({ length: terms.from }, () => 0n);
  let below = 0n;
  for (const term of terms.values) {
    below += term;
    const entry = (below << 64n) / total;
    if (entry >= one - 1n) break;
    entries.push(entry);
  }
  return {
    hi: Uint32Array.from(entries, (entry) => Number(entry >> 32n)),
    lo: Uint32Array.from(entries, (entry) => Number(entry & 0xffffffffn)),
  };
}

/** Binomial probabilities up to a common factor, for the weights from `from` on where they are not nil. */
function binomialTerms(n: number, p: number): { from: number; values: bigint[] } {
  const odds = exactOdds(p);
  if (odds.against === 0n) return { from: n, values: [1n] };
  const mode = Math.min(n, Math.floor((n + 1) * p));
  const largest = 1n << precision;
  const downwards: bigint[] = [];
  for (let w = mode, term = largest; w > 0; w--) {
    term = (term * BigInt(w) * odds.against) / (BigInt(n - w + 1) * odds.for);
    if (term === 0n) break;
    downwards.push(term);
  }
  const values = [...downwards.reverse(), largest];
  for (let w = mode, term = largest; w < n; w++) {
    term = (term * BigInt(n - w) * odds.for) / (BigInt(w + 1) * odds.against);
    if (term === 0n) break;
    values.push(term);
  }
  return { from: mode - downwards.length, values };
}

/** p : 1 − p as whole numbers; exact, since a binary floating-point number is a whole number over a power of 2. */
function exactOdds(p: number): { for: bigint; against: bigint } {
  let numerator = p;
  let denominator = 1n;
  while (!Number.isInteger(numerator)) {
    numerator *= 2;
    denominator *= 2n;
  }
  return { for: BigInt(numerator), against: denominator - BigInt(numerator) };
}

/** The weight that the 64-bit draw hi·2^32 + lo stands for, by bisection. */
export function weightOf(table: WeightTable, hi: number, lo: number): number {
  let least = 0;
  let most = table.hi.length;
  while (least < most) {
    const middle = (least + most) >> 1;
    const entryHi = table.hi[middle]!;
    if (hi < entryHi || (hi === entryHi && lo < table.lo[middle]!)) most = middle;
    else least = middle + 1;
  }
  return least;
}
