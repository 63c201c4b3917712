import { isSumOfTwoSquares, primePowerOf } from '../../algebra/integers.ts';
import { type Citation, InfeasibleError, LimitError, ParamError } from '../../errors.ts';

const BRUCK_RYSER: Citation = {
  authors: 'R. H. Bruck, H. J. Ryser',
  year: 1949,
  title: 'The nonexistence of certain finite projective planes',
  where: 'Canad. J. Math. 1, 88–93',
  part: 'Theorem 1',
};

const ORDER_TEN: Citation = {
  authors: 'C. W. H. Lam, L. H. Thiel, S. Swiercz',
  year: 1989,
  title: 'The non-existence of finite projective planes of order 10',
  where: 'Canad. J. Math. 41, 1117–1123',
};

/** Accepts the order of a Desarguesian plane up to `limit`. An affine plane of order q extends to a projective one, so
 *  the same rules refuse both. What is refused as no prime power may exist as a non-Desarguesian plane only if no rule
 *  forbids it: for order 12, nobody knows.
 *  @throws InfeasibleError when no plane of the order exists, ParamError when none is built here from it, LimitError
 *  above the limit. */
export function requirePlaneOrder(q: number, limit: number): void {
  const tooLarge = () => new LimitError(`a plane of order ${q}`, q * q + q + 1, limit * limit + limit + 1, 'points');
  if (q > 1e6) throw tooLarge(); // before any arithmetic that takes time
  refuseImpossibleOrder(q);
  if (!primePowerOf(q)) throw new ParamError('q', q, `a prime power from 2 to ${limit}`);
  if (q > limit) throw tooLarge();
}

function refuseImpossibleOrder(q: number): void {
  if ((q % 4 === 1 || q % 4 === 2) && !isSumOfTwoSquares(q)) {
    throw new InfeasibleError(
      'bruck-ryser-chowla',
      `No plane of order ${q} exists: ${q} ≡ ${q % 4} (mod 4) would have to be a sum of two squares, and it is not.`,
      BRUCK_RYSER,
      'q',
    );
  }
  if (q === 10) {
    throw new InfeasibleError(
      'order-ten',
      'No plane of order 10 exists, by an exhaustive computer search built on the weights of its binary code.',
      ORDER_TEN,
      'q',
    );
  }
}
