import { refinedJohnsonBound } from '../../bounds/johnson-bound.ts';
import { binomial } from '../../designs/subset-rank.ts';
import { type Citation, ParamError } from '../../errors.ts';
import { exactSize } from './exact-sizes.ts';
import { SIZE_TABLE, SIZE_TABLE_SOURCE, type SizeRow } from './size-table.ts';

/** What is known of A(n, d, w), the most words of length n, weight w and distance d. */
export interface KnownSize {
  /** Words that some code is known to have. */
  lower: { size: number; by: string; source?: Citation };
  /** Words that no code passes; proved. */
  upper: { size: number; by: string; source?: Citation };
  /** The published table's row, where there is one. */
  published?: SizeRow;
}

const JOHNSON: Citation = {
  authors: 'S. M. Johnson',
  year: 1962,
  title: 'A new upper bound for error-correcting codes',
  where: 'IRE Trans. Inf. Theory 8, 203–207',
};
const GRAHAM_SLOANE: Citation = {
  authors: 'R. L. Graham, N. J. A. Sloane',
  year: 1980,
  title: 'Lower bounds for constant weight codes',
  where: 'IEEE Trans. Inf. Theory 26, 37–43',
  part: 'Theorem 1',
};

/** An odd d counts as d + 1, since words of one weight differ in an even number of places.
 *  @throws ParamError unless 0 ≤ w ≤ n and d ≥ 1 are whole. */
export function knownSize(n: number, d: number, w: number): KnownSize {
  const bound = refinedJohnsonBound(n, Math.max(1, d), w);
  if (!Number.isSafeInteger(d) || d < 0) throw new ParamError('d', d, 'a whole number of 1 or more');
  const even = Math.max(2, d + (d % 2));
  const weight = Math.min(w, n - w);
  const published = SIZE_TABLE.find((row) => row.n === n && row.d === even && row.w === weight);
  const exact = exactSize(n, even, weight);
  if (exact) {
    const both = { size: exact.size, by: exact.theorem, source: exact.source };
    return { lower: both, upper: both, published };
  }
  return {
    lower: published
      ? { size: published.size, by: published.reachedBy, source: SIZE_TABLE_SOURCE }
      : constructed(n, even, weight),
    upper: { size: bound, by: 'Johnson’s bound, refined', source: JOHNSON },
    published,
  };
}

/** Words sorted by the sum of their positions modulo n differ in four places within a sort, and one of the n sorts has the
 *  n-th part of all words at least. */
function constructed(n: number, d: number, w: number): KnownSize['lower'] {
  if (d === 4)
    return {
      size: Math.ceil(binomial(n, w) / n),
      by: 'positions that sum to one value modulo n',
      source: GRAHAM_SLOANE,
    };
  return { size: Math.floor(n / w), by: 'disjoint words' };
}
