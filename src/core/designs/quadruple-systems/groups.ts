import { galoisField } from '../../algebra/galois-field.ts';

/** Generators of x ↦ m·x + s on GF(q) with the multipliers m of index e, fixing a further point ∞ = q. */
export function affineWithInfinity(q: number, e: number): Uint32Array[] {
  const { p, m, exp, add, mul } = galoisField(q);
  const onLine = (f: (x: number) => number) => Uint32Array.from({ length: q + 1 }, (_, x) => (x === q ? q : f(x)));
  const shifts = Array.from({ length: m }, (_, i) => onLine((x) => add(x, p ** i)));
  return [...shifts, onLine((x) => mul(x, exp[e % (q - 1)]!))];
}

/** The same multipliers on two copies of GF(q), x and q + x; with `exchange`, also the exchange of the copies. */
export function affineOnTwoCopies(q: number, e: number, exchange: boolean): Uint32Array[] {
  const { p, m, exp, add, mul } = galoisField(q);
  const onBoth = (f: (x: number) => number) =>
    Uint32Array.from({ length: 2 * q }, (_, x) => (x < q ? f(x) : q + f(x - q)));
  const shifts = Array.from({ length: m }, (_, i) => onBoth((x) => add(x, p ** i)));
  const scale = onBoth((x) => mul(x, exp[e % (q - 1)]!));
  return exchange
    ? [...shifts, scale, Uint32Array.from({ length: 2 * q }, (_, x) => (x + q) % (2 * q))]
    : [...shifts, scale];
}

/** The same multipliers on several copies of a prime field, x + jq, and a point fixed by all, ∞ = copies·q. */
export function affineOnCopiesWithInfinity(q: number, copies: number, multiplier: number): Uint32Array[] {
  const onAll = (f: (x: number) => number) =>
    Uint32Array.from({ length: copies * q + 1 }, (_, x) => (x === copies * q ? x : x - (x % q) + (f(x % q) % q)));
  return [onAll((x) => x + 1), onAll((x) => x * multiplier)];
}
