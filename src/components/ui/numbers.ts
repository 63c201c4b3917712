/** How numbers are written everywhere: thin spaces in long whole numbers, a real minus sign, powers of ten spelt out.
 *  Text only; `Sci` draws the same with a raised exponent. */

const THIN = '\u202f';
export const MINUS = '\u2212';

/** Groups of three from five digits on: 4161, 16 513, 1 048 576. */
export function wholeNumber(value: number | bigint): string {
  const digits = String(value < 0 ? -value : value);
  const grouped = digits.length > 4 ? digits.replace(/\B(?=(\d{3})+$)/g, THIN) : digits;
  return value < 0 ? MINUS + grouped : grouped;
}

export interface ScientificParts {
  mantissa: string;
  /** null when the number reads better without a power of ten. */
  exponent: number | null;
}

/** Splits a number for scientific notation; from 0.001 up to 99 999 it stays plain. `digits` counts significant ones. */
export function scientificParts(value: number, digits = 3): ScientificParts {
  if (!Number.isFinite(value)) return { mantissa: Number.isNaN(value) ? 'no value' : infinite(value), exponent: null };
  const size = Math.abs(value);
  if (value === 0) return { mantissa: '0', exponent: null };
  if (size >= 1e-3 && size < 1e5) return { mantissa: plain(value, digits), exponent: null };
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  return { mantissa: mantissa!.replace('-', MINUS), exponent: Number(exponent) };
}

/** One line of text, exponent in superscript characters: for axis labels, titles and file names of charts. */
export function scientific(value: number, digits = 3): string {
  const { mantissa, exponent } = scientificParts(value, digits);
  return exponent === null ? mantissa : `${mantissa}${THIN}×${THIN}10${superscript(exponent)}`;
}

const RAISED: Record<string, string> = Object.fromEntries([...'0123456789-'].map((c, i) => [c, '⁰¹²³⁴⁵⁶⁷⁸⁹⁻'[i]!]));

export function superscript(exponent: number): string {
  return [...String(exponent)].map((c) => RAISED[c] ?? c).join('');
}

/** "1 min 40 s", "3 h 12 min", "0.4 s": two units at most. */
export function duration(elapsedMs: number): string {
  if (!Number.isFinite(elapsedMs) || elapsedMs < 0) return 'unknown';
  if (elapsedMs < 1000) return `${Math.round(elapsedMs)} ms`;
  const seconds = elapsedMs / 1000;
  if (seconds < 9.95) return `${seconds.toFixed(1)} s`;
  const units = [
    ['d', 86_400],
    ['h', 3600],
    ['min', 60],
    ['s', 1],
  ] as const;
  let rest = Math.round(seconds);
  const parts: string[] = [];
  for (const [unit, size] of units) {
    const count = Math.floor(rest / size);
    rest -= count * size;
    if (count > 0) parts.push(`${count} ${unit}`);
    if (parts.length === 2 || (parts.length === 1 && count === 0)) break;
  }
  return parts.join(' ');
}

/** "1 code", "4 codes". */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${wholeNumber(count)} ${count === 1 ? one : many}`;
}

function plain(value: number, digits: number): string {
  if (Number.isInteger(value)) return wholeNumber(value);
  const text = Number(value.toPrecision(digits));
  const written = Math.abs(value) >= 1 ? String(text) : trimZeros(value.toFixed(decimalsFor(value, digits)));
  return written.replace('-', MINUS);
}

const decimalsFor = (value: number, digits: number) =>
  Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));

const trimZeros = (text: string) => (text.includes('.') ? text.replace(/\.?0+$/, '') : text);

const infinite = (value: number) => (value > 0 ? '∞' : `${MINUS}∞`);
