import { factor, legendre } from '../../algebra/integers.ts';
import { type FeasibilityRule, nameOf, symmetricOrder } from './rule.ts';

/** A symmetric design of order m = k − λ has m a square when v is even, and x² = m·y² + (−1)^((v−1)/2)·λ·z² solvable in
 *  integers not all zero when v is odd. */
export const bruckRyserChowla: FeasibilityRule = {
  id: 'bruck-ryser-chowla',
  source: {
    authors: 'S. Chowla, H. J. Ryser',
    year: 1950,
    title: 'Combinatorial problems',
    where: 'Canad. J. Math. 2, 93–99',
    part: 'after Bruck and Ryser 1949 for λ = 1',
  },
  forbids(query) {
    const order = symmetricOrder(query);
    if (order === null || order === 0) return null;
    const { v, lambda } = query;
    if (v % 2 === 0) {
      if (Number.isInteger(Math.sqrt(order))) return null;
      return `A ${nameOf(query)} design is symmetric on an even number of points, so its order k − λ = ${order} would have to be a square.`;
    }
    const sign = ((v - 1) / 2) % 2 === 0 ? 1 : -1;
    if (hasTernaryZero(order, sign * lambda)) return null;
    const equation = `x² = ${order}·y² ${sign > 0 ? '+' : '−'} ${lambda === 1 ? '' : `${lambda}·`}z²`;
    return `A ${nameOf(query)} design is symmetric of order ${order}, so ${equation} would need a solution in integers not all zero, and has none.`;
  },
};

/** Whether x² = a·y² + b·z² has a solution other than zero, for a > 0: by Legendre's theorem in Hilbert's form, exactly
 *  when the Hilbert symbol (a, b) is 1 at every odd prime dividing a·b and at infinity; the product formula then settles 2. */
export function hasTernaryZero(a: number, b: number): boolean {
  const primes = new Set([...factor(a), ...factor(Math.abs(b))].map(({ p }) => p));
  primes.delete(2);
  return [...primes].every((p) => hilbertSymbol(a, b, p) === 1);
}

/** The Hilbert symbol at an odd prime (Serre, A Course in Arithmetic, III, Theorem 1). */
function hilbertSymbol(a: number, b: number, p: number): number {
  const [alpha, u] = splitPower(a, p);
  const [beta, w] = splitPower(b, p);
  const sign = alpha % 2 === 1 && beta % 2 === 1 && p % 4 === 3 ? -1 : 1;
  return sign * (beta % 2 === 1 ? legendre(u, p) : 1) * (alpha % 2 === 1 ? legendre(w, p) : 1);
}

/** [e, u] with x = p^e·u and p not dividing u. */
function splitPower(x: number, p: number): [number, number] {
  let exponent = 0;
  let unit = x;
  for (; unit % p === 0; unit /= p) exponent++;
  return [exponent, unit];
}
