import type { Enclosure } from '../../evidence.ts';

/** A non-zero eigenvalue of N·Nᵀ, an integer, and how often it occurs. */
export interface Eigenvalue {
  value: number;
  multiplicity: number;
}

/** Enclosure of the rank of N over GF(2) from the non-zero eigenvalues of N·Nᵀ. Above, the rank over the rationals, which
 *  is their number ρ. Below, ρ less the even invariant factors of N: by Cauchy–Binet the product of the eigenvalues is the
 *  sum of the squares of the ρ-minors, each a multiple of the product of the invariant factors, so twice the number of even
 *  factors is at most the power of two in that product. */
export function rankFromSpectrum(spectrum: readonly Eigenvalue[]): Enclosure {
  const upper = spectrum.reduce((sum, { multiplicity }) => sum + multiplicity, 0);
  const powerOfTwo = spectrum.reduce((sum, { value, multiplicity }) => sum + multiplicity * twoAdicOrder(value), 0);
  return { lower: Math.max(0, upper - Math.floor(powerOfTwo / 2)), upper };
}

function twoAdicOrder(value: number): number {
  let order = 0;
  for (let rest = value; rest % 2 === 0; rest /= 2) order++;
  return order;
}
