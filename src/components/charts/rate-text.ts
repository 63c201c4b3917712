import type { Estimate } from '@/client/curves/curve.ts';
import { superscript } from '@/components/ui/numbers.ts';

const THIN = '\u202f';
/** Between a mantissa and its power of ten. */
const TIMES = `${THIN}×${THIN}10`;

export type Rounding = 'nearest' | 'up' | 'down';

/** A positive number as mantissa and power of ten, the mantissa in [1, 10) after rounding to so many digits. */
export function decimalParts(
  x: number,
  digits: number,
  rounding: Rounding = 'nearest',
): [mantissa: string, exponent: number] {
  const [mantissa, exponent] = x.toExponential(digits - 1).split('e') as [string, string];
  const rounded = Number(`${mantissa}e${exponent}`);
  const wanted = rounding === 'up' ? rounded >= x : rounding === 'down' ? rounded <= x : true;
  if (wanted) return [mantissa, Number(exponent)];
  const step = 10 ** (1 - digits) * (rounding === 'up' ? 1 : -1);
  return carry(Number(mantissa) + step, Number(exponent), digits);
}

function carry(mantissa: number, exponent: number, digits: number): [string, number] {
  if (mantissa >= 10) return [(mantissa / 10).toFixed(digits - 1), exponent + 1];
  if (mantissa < 1) return [(10 - 10 ** (1 - digits)).toFixed(digits - 1), exponent - 1];
  return [mantissa.toFixed(digits - 1), exponent];
}

/** "7.4 × 10⁻⁴"; exact powers of ten asked for with one digit read "10⁻⁴". The number must be positive. */
export function scientific(x: number, digits = 2, rounding: Rounding = 'nearest'): string {
  const [mantissa, exponent] = decimalParts(x, digits, rounding);
  if (mantissa === '1') return `10${superscript(exponent)}`;
  return `${mantissa}${TIMES}${superscript(exponent)}`;
}

/** From here up a rate reads more easily without a power of ten. */
const PLAIN_FROM = 0.01;

/** A positive rate without an interval: "0.989" and "7.4 × 10⁻⁴". */
export function plainRate(x: number, digits = 2, rounding: Rounding = 'nearest'): string {
  const [mantissa, exponent] = decimalParts(x, digits, rounding);
  const rounded = Number(`${mantissa}e${exponent}`);
  if (rounded < PLAIN_FROM) return scientific(x, digits, rounding);
  return rounded === 1 ? '1' : rounded.toFixed(Math.max(0, digits - 1 - exponent));
}

/** A measured rate as read: "7.4 × 10⁻⁴", from a hundredth up "0.34", or "< 3.0 × 10⁻⁶" with the upper limit when no error
 *  was seen. A limit is rounded away from the claim. */
export const rateText = (rate: Estimate, digits = 2): string =>
  rate.value === null ? `<${THIN}${plainRate(rate.upper, digits, 'up')}` : plainRate(rate.value, digits);

/** "(6.1 – 8.9) × 10⁻⁴"; an interval that starts at 0 is a bound: "< 3.0 × 10⁻⁶". Its ends are rounded outward. */
export function intervalText(rate: Estimate, digits = 2): string {
  if (rate.value === null || rate.lower <= 0) return `<${THIN}${plainRate(rate.upper, digits, 'up')}`;
  const [low, lowExponent] = decimalParts(rate.lower, digits, 'down');
  const [high, highExponent] = decimalParts(rate.upper, digits, 'up');
  const isPlain = rate.upper >= PLAIN_FROM;
  if (lowExponent === highExponent && !isPlain) return `(${low} – ${high})${TIMES}${superscript(lowExponent)}`;
  return `${plainRate(rate.lower, digits, 'down')} – ${plainRate(rate.upper, digits, 'up')}`;
}

/** A channel parameter as typed: "0.012", and "3 × 10⁻⁵" when decimals would only be zeros. */
export function parameterText(p: number): string {
  if (p >= 0.001) return String(Number(p.toPrecision(6)));
  const digits = Number(p.toPrecision(6)).toExponential().split('e')[0]?.replace('.', '').length ?? 1;
  return scientific(p, digits);
}

/** "99 %". */
export const levelText = (level: number): string => `${Number((level * 100).toPrecision(6))}${THIN}%`;
