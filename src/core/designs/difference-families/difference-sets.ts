import { galoisField } from '../../algebra/galois-field.ts';
import { isPrime, legendre, primePowerOf, squaresModulo } from '../../algebra/integers.ts';

/** Known cyclic difference sets with one base block, first match first: Singer, squares, twin primes, fourth powers.
 *  Null when none of these series has the parameters; another may exist. */
export function differenceSet(v: number, k: number, lambda: number): number[] | null {
  return (
    singerSet(v, k, lambda) ?? squaresSet(v, k, lambda) ?? twinPrimeSet(v, k, lambda) ?? fourthPowersSet(v, k, lambda)
  );
}

/** Exponents of the hyperplane of trace zero in GF(q^(m+1)): parameters ((q^(m+1)−1)/(q−1), (q^m−1)/(q−1), (q^(m−1)−1)/(q−1)).
 *  Source: J. Singer, Trans. AMS 43 (1938) 377–385. */
function singerSet(v: number, k: number, lambda: number): number[] | null {
  // (v − k) = q^m and (k − λ) = q^(m−1), so q is their ratio.
  const q = (v - k) / (k - lambda);
  if (!Number.isInteger(q) || !primePowerOf(q)) return null;
  const size = v * (q - 1) + 1;
  const m = Math.round(Math.log(size) / Math.log(q)) - 1;
  if (q ** (m + 1) !== size || k * (q - 1) + 1 !== q ** m || size > 2 ** 21) return null;
  const { exp, add, pow } = galoisField(size);
  const traceIsZero = (x: number) => {
    let sum = 0;
    for (let i = 0, y = x; i <= m; i++, y = pow(y, q)) sum = add(sum, y);
    return sum === 0;
  };
  return Array.from({ length: v }, (_, i) => i).filter((i) => traceIsZero(exp[i]!));
}

/** Non-zero squares modulo a prime p ≡ 3 (mod 4). Source: R. E. A. C. Paley, J. Math. Phys. 12 (1933) 311–320. */
function squaresSet(v: number, k: number, lambda: number): number[] | null {
  if (v % 4 !== 3 || k !== (v - 1) / 2 || lambda !== (v - 3) / 4 || !isPrime(v)) return null;
  return squaresModulo(v).filter((x) => x !== 0);
}

/** Modulo p(p + 2), both prime: numbers that are squares of both or of neither, and the multiples of p + 2.
 *  Source: R. G. Stanton and D. A. Sprott, Canad. J. Math. 10 (1958) 73–77. */
function twinPrimeSet(v: number, k: number, lambda: number): number[] | null {
  const p = Math.sqrt(v + 1) - 1;
  if (k !== (v - 1) / 2 || lambda !== (v - 3) / 4 || !Number.isInteger(p) || !isPrime(p) || !isPrime(p + 2))
    return null;
  return Array.from({ length: v }, (_, x) => x).filter(
    (x) => x % (p + 2) === 0 || (x % p !== 0 && legendre(x, p) === legendre(x, p + 2)),
  );
}

/** Non-zero fourth powers modulo a prime p = 4x² + 1 with x odd, or p = 4x² + 9 with zero added and x odd.
 *  Source: S. Chowla 1944; E. Lehmer, Canad. J. Math. 5 (1953) 425–432. */
function fourthPowersSet(v: number, k: number, lambda: number): number[] | null {
  if (v % 4 !== 1 || !isPrime(v)) return null;
  const powers = [...new Set(squaresModulo(v).map((x) => (x * x) % v))].filter((x) => x !== 0).sort((a, b) => a - b);
  const odd = (x: number) => Number.isInteger(x) && x % 2 === 1;
  if (k === (v - 1) / 4 && lambda === (v - 5) / 16 && odd(Math.sqrt((v - 1) / 4))) return powers;
  if (k === (v + 3) / 4 && lambda === (v + 3) / 16 && odd(Math.sqrt((v - 9) / 4))) return [0, ...powers];
  return null;
}
