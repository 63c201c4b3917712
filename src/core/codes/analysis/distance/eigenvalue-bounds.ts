import type { Citation } from '../../../errors.ts';
import type { Graded } from '../../../evidence.ts';
import type { OverlapSpectrum } from '../spectrum/second-eigenvalue.ts';

export const tanner2001: Citation = {
  authors: 'R. M. Tanner',
  year: 2001,
  title: 'Minimum-distance bounds by graph analysis',
  where: 'IEEE Trans. Inf. Theory 47, 808–821',
  part: 'Theorems 3.1 and 4.1',
};

/** Tanner's bit-oriented bound n(2j − μ₂)/(μ₁ − μ₂) for columns of weight j and eigenvalues μ₁ > μ₂ of HᵀH: a word x of
 *  weight d meets each check in 0 or at least 2 places, so 2jd ≤ ‖Hx‖² ≤ μ₁d²/n + μ₂(d − d²/n). Only this is used of the
 *  word, so it bounds stopping sets as well. Null when it says nothing. */
export function bitOrientedBound(
  n: number,
  { columnWeight: j, largest, second }: OverlapSpectrum,
): Graded<number> | null {
  return boundFrom((n * (2 * j - second.value)) / (largest - second.value), largest, second, 'bit-oriented');
}

/** Tanner's parity-oriented bound (2n/m)(2j + m − 2 − μ₂)/(μ₁ − μ₂) for rows of weight m: the s checks that a word meets
 *  have ‖Hᵀy‖² ≥ s(2(j − 1) + m), and the word has at least 2s/j bits. */
export function parityOrientedBound(
  n: number,
  { columnWeight: j, rowWeight: m, largest, second }: OverlapSpectrum,
): Graded<number> | null {
  const checks = ((n * j) / m) * ((2 * j + m - 2 - second.value) / (largest - second.value));
  return boundFrom((2 * ceilWithin(checks)) / j, largest, second, 'parity-oriented');
}

function boundFrom(
  value: number,
  largest: number,
  { value: second, method }: Graded<number>,
  name: string,
): Graded<number> | null {
  // Both bounds fall as μ₂ grows, and mean nothing for a graph in several pieces, whose μ₂ is μ₁.
  if (!(largest > second) || !(value > 0)) return null;
  const eigenvalue = Number.isInteger(second) ? second : second.toFixed(4);
  return {
    value: ceilWithin(value),
    grade: 'proved',
    method: `Tanner’s ${name} bound, μ₁ = ${largest}, μ₂ ≤ ${eigenvalue} (${method})`,
    source: tanner2001,
  };
}

/** Rounded up, but not for what rounding alone may have lifted above a whole number. */
const ceilWithin = (x: number) => Math.ceil(x - 1e-9 * Math.max(1, Math.abs(x)));
